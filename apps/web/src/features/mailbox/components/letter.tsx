import { openAttachment, readMail } from '@farlug/contract/routes';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { ask } from '../../../lib/call.ts';
import { formatBytes, formatMoment } from '../../../lib/format.ts';
import { routeUrl } from '../../../lib/route-url.ts';
import { FileButton } from '../../../ui/button.tsx';
import { ErrorState } from '../../../ui/error-state.tsx';
import { Particulars } from '../../../ui/key-values.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { linkedText } from '../linked-text.tsx';

export function Letter({ id }: { id: string }) {
  const letter = useQuery({
    queryKey: ['mailbox', id],
    queryFn: ({ signal }) => ask(readMail, { params: { message: id }, signal }),
    staleTime: Number.POSITIVE_INFINITY,
  });
  if (letter.isPending) return <Skeleton label="Opening the message" />;
  if (letter.isError)
    return <ErrorState title="The message cannot be opened">{letter.error.message}</ErrorState>;
  const { subject, from, to, at, text, attachments } = letter.data;
  return (
    <Scroller label="Text of the message" className="h-full overflow-auto">
      <article className="max-w-200 px-4 py-3 desk:px-6">
        <Link to={paths.mailbox()} className="inline-flex min-h-11 items-center desk:hidden">
          All messages
        </Link>
        <h2 className="mb-2 text-title">{subject}</h2>
        <Particulars
          items={[
            ['From', from],
            ['To', to.join(', ')],
            ['At', formatMoment(at)],
          ]}
        />
        {attachments.length > 0 && (
          <ul className="mt-3 flex flex-wrap gap-2" aria-label="Attachments">
            {attachments.map((attachment) => (
              <li key={attachment.index}>
                <FileButton
                  href={routeUrl(openAttachment, { message: id, index: attachment.index })}
                  target="_blank"
                  rel="noreferrer"
                >
                  {attachment.name}
                  <span className="text-label text-ink-soft">{formatBytes(attachment.bytes)}</span>
                </FileButton>
              </li>
            ))}
          </ul>
        )}
        <div className="mt-4 border-t border-ink pt-4 whitespace-pre-wrap">{linkedText(text)}</div>
      </article>
    </Scroller>
  );
}
