import type { LeftOut } from '@farlug/contract/job';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { formatCount } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { leftOutRows } from '../left-out-rows.ts';

interface LeftOutLinkProps {
  leftOut: readonly LeftOut[];
  count: number;
  nameOf: (circuitId: string) => string;
  to: (place: { circuit: string } | { panel: string }) => string;
}

/** How many rows no verdict stands on, and which they are and why. */
export function LeftOutLink({ leftOut, count, nameOf, to }: LeftOutLinkProps) {
  const [open, setOpen] = useState(false);
  if (count === 0) return null;
  const address = (circuitId: string | null, panelId: string | null) =>
    circuitId !== null ? to({ circuit: circuitId }) : panelId !== null ? to({ panel: panelId }) : null;
  return (
    <>
      <Button look="bare" onClick={() => setOpen(true)}>
        {formatCount(count, 'row')} left out
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        wide
        title={`${formatCount(count, 'row')} left out of the results`}
        description="No verdict counts what they draw: a report is issued once none is left out."
      >
        {open && (
          <Table caption="Rows that are left out">
            <thead>
              <tr>
                <Th>Row</Th>
                <Th>Why</Th>
              </tr>
            </thead>
            <tbody>
              {leftOutRows(leftOut).map(({ key, circuitId, panelId, code, reasons }) => {
                const name = circuitId !== null ? nameOf(circuitId) : (code ?? 'A row without a name');
                const where = address(circuitId, panelId);
                return (
                  <tr key={key}>
                    <RowHead>
                      {where === null ? (
                        name
                      ) : (
                        <Link to={where} onClick={() => setOpen(false)}>
                          {name}
                        </Link>
                      )}
                    </RowHead>
                    <Td>{reasons.join(' ')}</Td>
                  </tr>
                );
              })}
            </tbody>
          </Table>
        )}
      </Dialog>
    </>
  );
}
