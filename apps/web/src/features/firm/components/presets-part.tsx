import { newId } from '@farlug/contract/edit';
import { LIMIT_PRESETS } from '@farlug/contract/presets';
import { useState } from 'react';
import { formatLimit } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { Message } from '../../../ui/message.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import type { EditPreset, FirmPartProps, Preset } from '../firm-part.ts';
import { PartHeading } from './part-heading.tsx';

const figureOf = (preset: Preset, kind: 'feeder' | 'branch' | 'total') => {
  const found = preset.limits.find((limit) => limit.kind === kind && limit.class === null);
  return found ? formatLimit(found.value) : '';
};
const others = (preset: Preset) =>
  preset.limits.length -
  (['feeder', 'branch', 'total'] as const).filter((kind) => figureOf(preset, kind)).length;

export function PresetsPart({
  firm,
  actions,
  mayManage,
  editPreset: EditPreset,
}: FirmPartProps & { editPreset: EditPreset }) {
  const [open, setOpen] = useState<{ id: string; preset: Preset | null } | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  return (
    <>
      <PartHeading
        title="Limit presets"
        note="Chosen when a job is made. Changing a preset changes no job that took it."
        action={
          mayManage && (
            <Button look="go" onClick={() => setOpen({ id: newId(), preset: null })}>
              New preset
            </Button>
          )
        }
      />
      {refused && (
        <Message kind="wrong" className="mx-4 mb-2">
          {refused}
        </Message>
      )}
      {firm.presets.length === 0 ? (
        <EmptyState title="No preset yet">Limits are then typed on each job.</EmptyState>
      ) : (
        <Table stacked caption="Limit presets">
          <thead>
            <tr>
              <Th>Name</Th>
              <Th>Clause</Th>
              <Th>Force</Th>
              <Th numeric>Feeder</Th>
              <Th numeric>Branch</Th>
              <Th numeric>Together</Th>
              <Th numeric>Others</Th>
              {mayManage && (
                <Th>
                  <span className="sr-only">Actions</span>
                </Th>
              )}
            </tr>
          </thead>
          <tbody>
            {firm.presets.map((preset) => (
              <tr key={preset.id}>
                <RowHead>{preset.name}</RowHead>
                <Td label="Clause">{preset.clause}</Td>
                <Td label="Force">{preset.force}</Td>
                <Td label="Feeder" numeric>
                  {figureOf(preset, 'feeder')}
                </Td>
                <Td label="Branch" numeric>
                  {figureOf(preset, 'branch')}
                </Td>
                <Td label="Together" numeric>
                  {figureOf(preset, 'total')}
                </Td>
                <Td label="Others" numeric>
                  {others(preset) || ''}
                </Td>
                {mayManage && (
                  <Td className="whitespace-nowrap text-right">
                    <Button
                      look="bare"
                      aria-label={`Change ${preset.name}`}
                      onClick={() => setOpen({ id: preset.id, preset })}
                    >
                      Change
                    </Button>{' '}
                    <Button
                      look="bare"
                      aria-label={`Remove ${preset.name}`}
                      className="ml-3"
                      onClick={async () =>
                        setRefused((await actions.removePreset(preset.id))?.message ?? null)
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
      <PartHeading title="Codes and standards" note="Offered beside your own on every job." />
      <Table stacked caption="Limits of codes and standards">
        <thead>
          <tr>
            <Th>Name</Th>
            <Th>Clause</Th>
            <Th>Edition</Th>
            <Th>Standing</Th>
            <Th>How it was seen</Th>
          </tr>
        </thead>
        <tbody>
          {LIMIT_PRESETS.map((preset) => (
            <tr key={preset.id}>
              <RowHead className="min-w-48">{preset.name}</RowHead>
              <Td label="Clause" className="min-w-48">
                {preset.clause}
              </Td>
              <Td label="Edition">{preset.edition}</Td>
              <Td label="Standing">{preset.standing}</Td>
              <Td label="How it was seen" className="text-ink-soft">
                {preset.verified}
              </Td>
            </tr>
          ))}
        </tbody>
      </Table>
      {open && (
        <EditPreset
          preset={open.preset}
          onClose={() => setOpen(null)}
          save={async (body) => {
            const error = await actions.savePreset(open.id, body);
            if (!error) setOpen(null);
            return error;
          }}
        />
      )}
    </>
  );
}
