import { LOAD_CLASSES, type LoadClass } from '@farlug/solver/job';
import { CLASS_WORDS } from '../../../lib/job-words.ts';
import { Button } from '../../../ui/button.tsx';
import { Field } from '../../../ui/field.tsx';
import { FormSection } from '../../../ui/form-section.tsx';
import { Select } from '../../../ui/select.tsx';
import { CLASS_LIMITS, type ClassLimit } from '../job-draft.ts';
import { type LimitsForm, NumberField } from './draft-fields.tsx';

const SHORT = { feeder: 'Feeder, %', branch: 'Branch, %', total: 'Together, %' } as const;

export function ClassLimits({ form, onTyped }: { form: LimitsForm; onTyped: () => void }) {
  const list = form.values.byClass;
  const write = (next: ClassLimit[]) => {
    onTyped();
    form.set('byClass', next);
  };
  const free = LOAD_CLASSES.filter((name) => !list.some((entry) => entry.class === name));
  return (
    <FormSection
      title="Other limits for a class of loads"
      note="In place of those above, for loads of that class."
      columns={1}
    >
      {list.map((entry, index) => (
        <div
          key={entry.class}
          className="grid grid-cols-2 items-start gap-3 border-b border-hair pb-3 desk:grid-cols-[2fr_1fr_1fr_1fr_auto]"
        >
          <Field
            label="Class"
            error={form.errors[`byClass.${index}.class`]}
            className="col-span-2 desk:col-span-1"
          >
            <Select
              value={entry.class}
              onValue={(name: LoadClass) =>
                write(list.map((other, i) => (i === index ? { ...other, class: name } : other)))
              }
              choices={LOAD_CLASSES.filter((name) => name === entry.class || free.includes(name)).map(
                (name) => ({
                  value: name,
                  label: CLASS_WORDS[name],
                }),
              )}
            />
          </Field>
          {CLASS_LIMITS.map((kind) => (
            <NumberField
              key={kind}
              label={SHORT[kind]}
              error={form.errors[`byClass.${index}.${kind}`]}
              value={entry[kind]}
              onText={(text) =>
                write(list.map((other, i) => (i === index ? { ...other, [kind]: text } : other)))
              }
            />
          ))}
          <Button
            look="bare"
            className="mt-4.5 desk:h-10"
            aria-label={`Remove the limits of ${CLASS_WORDS[entry.class]}`}
            onClick={() => write(list.filter((_, i) => i !== index))}
          >
            Remove
          </Button>
        </div>
      ))}
      <div>
        <Button
          disabled={free.length === 0}
          onClick={() =>
            write([
              ...list,
              {
                class: free.includes('sensitive') ? 'sensitive' : free[0]!,
                feeder: '',
                branch: '',
                total: '',
              },
            ])
          }
        >
          Add a class
        </Button>
      </div>
    </FormSection>
  );
}
