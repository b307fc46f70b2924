import { downloadInspectionPdf, type InspectionView } from '@farlug/contract/routes';
import { useState } from 'react';
import { ApiError } from '../../../lib/api-error.ts';
import { formatDay, formatMoment, shortHash } from '../../../lib/format.ts';
import { revisionLetter } from '../../../lib/revision-letter.ts';
import { routeUrl } from '../../../lib/route-url.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { FileButton } from '../../../ui/button.tsx';
import { Cautions } from '../../../ui/cautions.tsx';
import { ErrorState } from '../../../ui/error-state.tsx';
import { Particulars } from '../../../ui/key-values.tsx';
import { Mark } from '../../../ui/mark.tsx';
import { Message } from '../../../ui/message.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { basisOf } from '../basis-of.ts';
import { useInspection } from '../hooks/use-inspection.ts';
import { AssumedList } from './assumed-list.tsx';
import { DecisionForm } from './decision-form.tsx';
import { DecisionList } from './decision-list.tsx';
import { Findings } from './findings.tsx';
import { LinkEnded } from './link-ended.tsx';

export function InspectionPage() {
  const inspection = useInspection();
  const block = inspection.data?.input.titleBlock;
  usePageTitle(block && `Revision ${revisionLetter(block.revision)}`, block?.job);
  if (inspection.isPending) return <Skeleton label="Opening the report" rows={10} />;
  if (inspection.isError) {
    const gone =
      inspection.error instanceof ApiError &&
      ['link_gone', 'sign_in_needed', 'forbidden'].includes(inspection.error.code);
    return gone ? (
      <LinkEnded />
    ) : (
      <main id="main">
        <ErrorState
          level="h1"
          title="The report cannot be opened now"
          onRetry={() => void inspection.refetch()}
        >
          {inspection.error.message}
        </ErrorState>
      </main>
    );
  }
  return <Report view={inspection.data} />;
}

function Report({ view }: { view: InspectionView }) {
  const { input } = view;
  const block = input.titleBlock;
  const letter = revisionLetter(view.revisionNo);
  const [asked, setAsked] = useState<{ no: number; place: string } | null>(null);
  return (
    <div className="mx-auto max-w-240">
      <header className="border-t-2 border-b border-ink bg-sheet px-4 py-2.5">
        <div className="flex items-center gap-2">
          <Mark size={22} />
          <h1 tabIndex={-1} data-page-heading className="min-w-0 text-body outline-none">
            {block.job}
          </h1>
          <span className="ml-auto whitespace-nowrap text-ink-soft">Revision {letter}</span>
        </div>
        <p className="text-label text-ink-soft">
          Issued {formatMoment(view.issuedAt)} by {block.issuedBy}, {block.firm}. Input{' '}
          {shortHash(view.sha256)}, solver {view.solverVersion}
        </p>
      </header>
      <main
        id="main"
        className="[&>section]:border-b [&>section]:border-rule [&>section]:bg-sheet [&>section]:px-4 [&>section]:py-3"
      >
        {view.superseded && (
          <Message kind="note" className="border-b border-b-rule">
            <b>A later revision has been issued.</b> This one is no longer the newest; ask {block.firm} for it
            before deciding.
          </Message>
        )}
        <section aria-label="The report">
          <p className="text-title text-pretty">
            For {view.recipientName}: the voltage drop report of {block.job}
            {block.address ? `, ${block.address}` : ''}.
          </p>
          <p className="mt-1 text-grid text-ink-soft">
            Every run with its verdict, the node equations of one panel and the hand check beside each radial
            run stand in the PDF. It can be checked with a pencil.
          </p>
          <div className="mt-3 flex flex-wrap items-center gap-3" data-print="never">
            {view.pdf === 'ready' ? (
              <FileButton
                look="line"
                big
                href={routeUrl(downloadInspectionPdf)}
                target="_blank"
                rel="noreferrer"
              >
                Open the report, PDF
              </FileButton>
            ) : (
              <Message kind={view.pdf === 'failed' ? 'wrong' : 'note'}>
                {view.pdf === 'failed'
                  ? `The PDF could not be made. Ask ${block.firm} for it.`
                  : 'The PDF is being made; it is here in a moment.'}
              </Message>
            )}
            <span className="text-label text-ink-soft">
              This page is open to you until {formatDay(view.linkExpiresAt)}.
            </span>
          </div>
        </section>
        <Findings
          view={view}
          onComment={(place) => setAsked((last) => ({ no: (last?.no ?? 0) + 1, place }))}
        />
        <section aria-label="What it stands on">
          <h2 className="mb-1 text-label font-normal text-ink-soft">What it stands on</h2>
          <Particulars items={basisOf(input)} />
        </section>
        {input.note && (
          <section aria-label="Note">
            <h2 className="mb-1 text-label font-normal text-ink-soft">Note of {block.issuedBy}</h2>
            <p className="whitespace-pre-line">{input.note}</p>
          </section>
        )}
        <AssumedList input={input} />
        <section aria-label="Tables">
          <h2 className="mb-1 text-label font-normal text-ink-soft">
            Tables, to be confirmed against the adopted edition
          </h2>
          <ul className="text-grid">
            {input.tables.map((table) => (
              <li key={table.id}>{table.source}</li>
            ))}
          </ul>
        </section>
        <DecisionList decisions={view.decisions} />
        <section aria-label="Notices">
          <Cautions texts={input.notices} firmWording={input.firmWording} />
        </section>
      </main>
      <DecisionForm letter={letter} recipient={view.recipientName} asked={asked} />
    </div>
  );
}
