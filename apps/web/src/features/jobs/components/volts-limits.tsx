import { Button } from '../../../ui/button.tsx';
import { Field } from '../../../ui/field.tsx';
import { FormSection } from '../../../ui/form-section.tsx';
import { Select } from '../../../ui/select.tsx';
import type { VoltsLimit } from '../job-draft.ts';
import { type LimitsForm, NumberField } from './draft-fields.tsx';

/** Lowest and highest volts that hold at one nominal voltage only. */
export function VoltsLimits({ form, onTyped }: { form: LimitsForm; onTyped: () => void }) {
  const list = form.values.atVolts;
  const write = (next: VoltsLimit[]) => {
    onTyped();
    form.set('atVolts', next);
  };
  const change = (index: number, fields: Partial<VoltsLimit>) =>
    write(list.map((entry, i) => (i === index ? { ...entry, ...fields } : entry)));
  return (
    <FormSection
      title="Volts at one nominal voltage"
      note="As at least 110 V where 120 V is nominal. They win over the figures above."
      columns={1}
    >
      {list.map((entry, index) => (
        <div
          key={index}
          className="grid grid-cols-2 items-start gap-3 border-b border-hair pb-3 desk:grid-cols-[2fr_1fr_1fr_auto]"
        >
          <Field label="Limit" className="col-span-2 desk:col-span-1">
            <Select
              value={entry.kind}
              onValue={(kind: VoltsLimit['kind']) => change(index, { kind })}
              choices={[
                { value: 'lowest-volts', label: 'Lowest volts at a load' },
                { value: 'highest-volts', label: 'Highest volts at a load' },
              ]}
            />
          </Field>
          <NumberField
            label="At nominal, V"
            error={form.errors[`atVolts.${index}.atVolts`]}
            value={entry.atVolts}
            onText={(atVolts) => change(index, { atVolts })}
          />
          <NumberField
            label="Volts"
            error={form.errors[`atVolts.${index}.value`]}
            value={entry.value}
            onText={(value) => change(index, { value })}
          />
          <Button
            look="bare"
            className="mt-4.5 desk:h-10"
            aria-label={`Remove the limit at ${entry.atVolts || 'no'} volts`}
            onClick={() => write(list.filter((_, i) => i !== index))}
          >
            Remove
          </Button>
        </div>
      ))}
      <div>
        <Button onClick={() => write([...list, { kind: 'lowest-volts', atVolts: '', value: '' }])}>
          Add a voltage
        </Button>
      </div>
    </FormSection>
  );
}
