import { useState } from 'react';
import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import type { Sync } from '../../../job/replica.ts';
import { formatCount } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Table, Td, Th } from '../../../ui/table.tsx';
import { valueText } from '../value-text.ts';

/** Whether everything typed is saved; what is in the way can be settled from here. */
export function SavedState() {
  const { sync, headSeq } = useReplica();
  const [open, setOpen] = useState(false);
  const stuck = sync.kind === 'conflict' || sync.kind === 'refused';
  return (
    <div className="text-label">
      <p role="status" className={stuck ? 'font-bold text-over' : 'text-ink-soft'}>
        {words(sync, headSeq)}
      </p>
      {stuck && (
        <Button look="bare" onClick={() => setOpen(true)}>
          {sync.kind === 'conflict' ? 'Choose whose value stays' : 'See why'}
        </Button>
      )}
      <SettleDialog sync={sync} open={open && stuck} onOpenChange={setOpen} />
    </div>
  );
}

function words(sync: Sync, headSeq: number): string {
  switch (sync.kind) {
    case 'saved':
      return `Saved, change ${headSeq}`;
    case 'saving':
      return `Saving ${formatCount(sync.waiting, 'change')}…`;
    case 'waiting':
      return `${formatCount(sync.waiting, 'change')} kept here, not yet saved`;
    case 'conflict':
      return 'Changed by two people';
    case 'refused':
      return 'A change was not taken';
  }
}

function SettleDialog({
  sync,
  open,
  onOpenChange,
}: {
  sync: Sync;
  open: boolean;
  onOpenChange: (open: boolean) => void;
}) {
  const { replica } = useOpenJob();
  if (sync.kind === 'refused')
    return (
      <Dialog
        open={open}
        onOpenChange={onOpenChange}
        title={`Not saved: ${sync.edit.label}`}
        description={sync.message}
        actions={
          <Button look="danger" onClick={() => replica.discard()}>
            Let this change go
          </Button>
        }
      />
    );
  if (sync.kind !== 'conflict') return null;
  const whole = sync.conflicts.some((conflict) => conflict.field === null);
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      wide
      title={`Changed by somebody else too: ${sync.edit.label}`}
      description={
        whole
          ? 'A row that this change needs was added or deleted meanwhile; what does not depend on it is kept.'
          : 'Nothing was overwritten. Choose whose values stay; what does not collide is kept either way.'
      }
      actions={
        <>
          {!whole && (
            <Button look="go" onClick={() => replica.resolve('mine')}>
              Keep mine
            </Button>
          )}
          <Button onClick={() => replica.resolve('theirs')}>
            {whole ? 'Go on without it' : 'Keep what was saved'}
          </Button>
        </>
      }
    >
      <Table caption="Values that collide">
        <thead>
          <tr>
            <Th>Field</Th>
            <Th>Was</Th>
            <Th>Saved meanwhile</Th>
            <Th>Typed here</Th>
          </tr>
        </thead>
        <tbody>
          {sync.conflicts.map((conflict) => (
            <tr key={`${conflict.row} ${conflict.field}`}>
              <Td>
                {conflict.table}
                {conflict.field === null ? '' : `, ${conflict.field}`}
              </Td>
              <Td>{valueText(conflict.was)}</Td>
              <Td>{valueText(conflict.is)}</Td>
              <Td>{valueText(conflict.set)}</Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </Dialog>
  );
}
