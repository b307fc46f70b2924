import type { Edit } from '@farlug/contract/edit';
import type { JobRows } from '@farlug/contract/rows';
import { scheduleView } from '@farlug/contract/schedule';
import { useMemo, useState } from 'react';
import { formatCount } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Message } from '../../../ui/message.tsx';

export interface WrittenImport {
  file: string;
  code: string;
  edit: Edit;
}

interface WrittenProps {
  open: boolean;
  rows: JobRows;
  written: WrittenImport;
  onUndo: () => string | null;
  onClose: () => void;
  onShow: ((panelId: string) => void) | undefined;
}

/** What an upload came to, what it still lacks, and the way back. */
export function Written({ open, rows, written, onUndo, onClose, onShow }: WrittenProps) {
  const [refused, setRefused] = useState<string | null>(null);
  const { code, edit, file } = written;
  const panel = useMemo(() => scheduleView(rows).panels.find((one) => one.code === code), [rows, code]);
  const made = new Set(
    edit.ops.filter((op) => op.table === 'circuit' && op.was === null).map((op) => op.row),
  );
  const own = panel?.circuits.filter((circuit) => made.has(circuit.id)) ?? [];
  const lengths = own.filter((circuit) => circuit.next?.field === 'length').length;
  const others = own.filter((circuit) => circuit.next && circuit.next.field !== 'length').length;
  return (
    <Dialog
      open={open}
      onOpenChange={(next) => !next && onClose()}
      title={`${file} is in ${code}`}
      actions={
        <>
          <Button look="go" big onClick={() => (onShow && panel ? onShow(panel.id) : onClose())}>
            {onShow && panel ? `Show ${code}` : 'Close'}
          </Button>
          <Button
            big
            onClick={() => {
              setRefused(onUndo());
            }}
          >
            Undo the upload
          </Button>
        </>
      }
    >
      {refused && <Message kind="wrong">{refused}</Message>}
      <Message kind="done">{formatCount(own.length, 'row')} written in one step.</Message>
      {panel && panel.fedFrom === null && (
        <Message kind="note" className="mt-2">
          Nothing feeds {code} yet: say what does, and its circuits are judged.
        </Message>
      )}
      {lengths > 0 && (
        <Message kind="note" className="mt-2">
          {formatCount(lengths, 'circuit')} without a length: the next thing to fill in. Until then they are
          left out of the results.
        </Message>
      )}
      {others > 0 && (
        <Message kind="note" className="mt-2">
          {formatCount(others, 'circuit')} with something else to fill in.
        </Message>
      )}
    </Dialog>
  );
}
