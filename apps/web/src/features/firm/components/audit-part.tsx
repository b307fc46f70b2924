import { firmAudit } from '@farlug/contract/routes';
import { useInfiniteQuery } from '@tanstack/react-query';
import { ask } from '../../../lib/call.ts';
import { formatMoment } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { ErrorState } from '../../../ui/error-state.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { PartHeading } from './part-heading.tsx';

export function AuditPart({ firm }: { firm: string }) {
  const audit = useInfiniteQuery({
    queryKey: ['firm', firm, 'audit'],
    queryFn: ({ pageParam, signal }) =>
      ask(firmAudit, { params: { firm }, query: pageParam ? { before: pageParam } : {}, signal }),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.events.at(-1)?.at ?? null,
  });
  if (audit.isPending) return <Skeleton label="Fetching the audit trail" />;
  if (audit.isError)
    return (
      <ErrorState title="The audit trail could not be fetched" onRetry={() => void audit.refetch()}>
        {audit.error.message}
      </ErrorState>
    );
  const events = audit.data.pages.flatMap((page) => page.events);
  const last = audit.data.pages.at(-1)?.events.length ?? 0;
  return (
    <>
      <PartHeading
        title="Audit trail"
        note="Who did what to the firm, its people and its reports. Nothing is ever taken out."
      />
      {events.length === 0 ? (
        <EmptyState title="Nothing has happened yet" />
      ) : (
        <Table stacked caption="Audit trail">
          <thead>
            <tr>
              <Th>When</Th>
              <Th>Who</Th>
              <Th>What</Th>
              <Th>Of</Th>
            </tr>
          </thead>
          <tbody>
            {events.map((event) => (
              <tr key={`${event.at} ${event.what} ${event.subject}`}>
                <RowHead className="whitespace-nowrap font-normal">{formatMoment(event.at)}</RowHead>
                <Td label="Who">{event.person ?? 'the product itself'}</Td>
                <Td label="What">{event.what}</Td>
                <Td label="Of" className="text-ink-soft">
                  {event.subject}
                </Td>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
      {audit.hasNextPage && last > 0 && (
        <div className="px-4 py-4">
          <Button
            onClick={() => void audit.fetchNextPage()}
            aria-disabled={audit.isFetchingNextPage || undefined}
          >
            Show older
          </Button>
        </div>
      )}
    </>
  );
}
