import type { JobRows } from '@farlug/contract/rows';
import { panelTree } from '@farlug/contract/schedule';
import { Field } from '../../../ui/field.tsx';
import { Select } from '../../../ui/select.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { feedChoices } from '../dialogs/feed-choices.ts';
import type { TargetDraft, TargetReading } from './sheet-plan.ts';

interface TargetFieldsProps {
  rows: JobRows;
  target: TargetDraft;
  errors: TargetReading['errors'];
  onChange: (fields: Partial<TargetDraft>) => void;
}

/** Which panel the circuits go into; a new one gets its name here. */
export function TargetFields({ rows, target, errors, onChange }: TargetFieldsProps) {
  const panels = panelTree(rows).map(({ panel }) => {
    const bus = rows.bus.get(panel.busId)!;
    return { value: panel.id, label: bus.name ? `${bus.code} ${bus.name}` : bus.code };
  });
  return (
    <div className="grid gap-3 desk:grid-cols-4">
      <Field label="Into" className="desk:col-span-2">
        <Select
          value={target.panelId}
          onValue={(panelId) => onChange({ panelId })}
          choices={[{ value: '', label: 'A new panel' }, ...panels]}
        />
      </Field>
      {target.panelId === '' && (
        <>
          <Field label="Its name" required error={errors.code} className="desk:col-span-2">
            <TextInput
              maxLength={60}
              placeholder="LP-1"
              value={target.code}
              onChange={(event) => onChange({ code: event.target.value })}
            />
          </Field>
          <Field label="Fed from" className="desk:col-span-2" hint={feedHint(target.feed)}>
            <Select
              value={target.feed}
              onValue={(feed) => onChange({ feed })}
              choices={[{ value: '', label: 'Nothing yet' }, ...feedChoices(rows)]}
            />
          </Field>
          <Field label="Spaces" required error={errors.spaces}>
            <TextInput
              inputMode="numeric"
              maxLength={3}
              value={target.spaces}
              onChange={(event) => onChange({ spaces: event.target.value })}
            />
          </Field>
          <Field label="Main breaker, A" error={errors.mainAmps} hint="Empty: lugs only.">
            <TextInput
              inputMode="decimal"
              maxLength={20}
              value={target.mainAmps}
              onChange={(event) => onChange({ mainAmps: event.target.value })}
            />
          </Field>
        </>
      )}
    </div>
  );
}

function feedHint(feed: TargetDraft['feed']): string {
  if (feed === '') return 'Until something feeds it, its circuits are left out of the results.';
  const by = feed.startsWith('panel:') ? 'By the next open spaces; ' : '';
  return `${by}size and length of its feeder are filled in afterwards.`.replace(/^s/, 'S');
}
