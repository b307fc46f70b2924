import { newId } from '@farlug/contract/edit';
import { useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { Message } from '../../../ui/message.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import type { FirmPartProps } from '../firm-part.ts';
import { PER_WORDS } from '../per-words.ts';
import { ConductorDialog } from './conductor-dialog.tsx';
import { PartHeading } from './part-heading.tsx';

type ConductorRow = FirmPartProps['firm']['conductors'][number];

export function ConductorsPart({ firm, actions, mayManage }: FirmPartProps) {
  const [open, setOpen] = useState<{ id: string; row: ConductorRow | null } | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  return (
    <>
      <PartHeading
        title="Own conductors"
        note="Sizes that no table holds: busway, special cable, a maker’s figures. Each names its source. A job keeps the figures that it was first sized with."
        action={
          mayManage && (
            <Button look="go" onClick={() => setOpen({ id: newId(), row: null })}>
              New conductor
            </Button>
          )
        }
      />
      {refused && (
        <Message kind="wrong" className="mx-4 mb-2">
          {refused}
        </Message>
      )}
      {firm.conductors.length === 0 ? (
        <EmptyState title="No conductor of your own yet">
          The tables of the product are always there.
        </EmptyState>
      ) : (
        <Table stacked caption="Conductors of the firm">
          <thead>
            <tr>
              <Th>Name</Th>
              <Th>Material</Th>
              <Th numeric>mm²</Th>
              <Th numeric>R</Th>
              <Th numeric>X</Th>
              <Th>Unit</Th>
              <Th numeric>°C</Th>
              <Th numeric>Ampacity</Th>
              <Th>Source</Th>
              {mayManage && (
                <Th>
                  <span className="sr-only">Actions</span>
                </Th>
              )}
            </tr>
          </thead>
          <tbody>
            {firm.conductors.map((row) => (
              <tr key={row.id}>
                <RowHead>{row.name}</RowHead>
                <Td label="Material">{row.material}</Td>
                <Td label="mm²" numeric>
                  {row.areaMm2}
                </Td>
                <Td label="R" numeric>
                  {row.r}
                </Td>
                <Td label="X" numeric>
                  {row.x}
                </Td>
                <Td label="Unit">{PER_WORDS[row.per]}</Td>
                <Td label="°C" numeric>
                  {row.temperature}
                </Td>
                <Td label="Ampacity" numeric>
                  {row.ampacity === null ? '' : `${row.ampacity} A`}
                </Td>
                <Td label="Source" className="text-ink-soft">
                  {row.source}
                </Td>
                {mayManage && (
                  <Td className="whitespace-nowrap text-right">
                    <Button
                      look="bare"
                      aria-label={`Change ${row.name}`}
                      onClick={() => setOpen({ id: row.id, row })}
                    >
                      Change
                    </Button>
                    <Button
                      look="bare"
                      className="ml-3"
                      aria-label={`Remove ${row.name}`}
                      onClick={async () =>
                        setRefused((await actions.removeConductor(row.id))?.message ?? null)
                      }
                    >
                      Remove
                    </Button>
                  </Td>
                )}
              </tr>
            ))}
          </tbody>
        </Table>
      )}
      {open && (
        <ConductorDialog
          row={open.row}
          onClose={() => setOpen(null)}
          save={async (body) => {
            const error = await actions.saveConductor(open.id, body);
            if (!error) setOpen(null);
            return error;
          }}
        />
      )}
    </>
  );
}
