import type { saveFirmConductor } from '@farlug/contract/routes';
import type { OHMS_PER } from '@farlug/contract/rows';
import { MATERIALS, type Material } from '@farlug/solver/job';
import type { z } from 'zod';
import type { ApiError } from '../../../lib/api-error.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Dialog } from '../../../ui/dialog.tsx';
import { Field } from '../../../ui/field.tsx';
import { Form } from '../../../ui/form.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import { PER_WORDS } from '../per-words.ts';

type ConductorBody = z.input<typeof saveFirmConductor.body>;
type OhmsPer = (typeof OHMS_PER)[number];
type Typed = Omit<ConductorBody, 'ampacity'> & { ampacity: string };

const BLANK: Typed = {
  name: '',
  material: 'copper',
  areaMm2: '',
  r: '',
  x: '0',
  per: '1000ft',
  temperature: '75',
  ampacity: '',
  source: '',
};

interface NumberRule {
  field: 'areaMm2' | 'r' | 'x' | 'temperature' | 'ampacity';
  label: string;
  hint: string;
  above: boolean;
}
const NUMBERS: readonly NumberRule[] = [
  { field: 'areaMm2', label: 'Area, mm²', hint: 'Of one conductor.', above: true },
  { field: 'r', label: 'R', hint: 'Of one conductor at the temperature below.', above: false },
  { field: 'x', label: 'X', hint: '0 where it is not known.', above: false },
  { field: 'temperature', label: 'Temperature, °C', hint: 'At which R was given.', above: false },
  {
    field: 'ampacity',
    label: 'Ampacity, A',
    hint: 'Empty: the breaker is then not checked against it.',
    above: true,
  },
];
const DECIMAL = /^\d{1,9}(\.\d{1,9})?$/;

function numberErrors(values: Typed): Record<string, string> {
  const errors: Record<string, string> = {};
  for (const { field, above } of NUMBERS) {
    const text = values[field].trim();
    if (text === '' && field === 'ampacity') continue;
    if (!DECIMAL.test(text) || (above && Number(text) === 0))
      errors[field] = above ? 'Enter a number above 0, as 42.4.' : 'Enter a number of 0 or more, as 0.24.';
  }
  if (!errors.temperature && Number(values.temperature) > 250) errors.temperature = 'Enter at most 250 °C.';
  if (values.name.trim() === '') errors.name = 'Enter a name, as it is to stand in the schedule.';
  if (values.source.trim() === '')
    errors.source = 'Say where the figures come from, as a data sheet and its date.';
  return errors;
}

export function ConductorDialog({
  row,
  onClose,
  save,
}: {
  row: (ConductorBody & { id: string }) | null;
  onClose: () => void;
  save: (body: ConductorBody) => Promise<ApiError | null>;
}) {
  const { id: _, ...given } = row ?? { id: '', ...BLANK };
  const form = useForm<Typed>({
    initial: { ...BLANK, ...given, ampacity: given.ampacity ?? '' },
    check: numberErrors,
    submit: (values) =>
      save({
        ...values,
        name: values.name.trim(),
        source: values.source.trim(),
        ampacity: values.ampacity.trim() || null,
      }),
  });
  const { values, set, errors } = form;
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => !open && onClose()}
      title={row ? `Change ${row.name}` : 'New conductor'}
      description="Ohms of one conductor per length; a run of several sets divides them."
    >
      <Form label="Conductor" onSubmit={form.onSubmit} error={form.formError} busy={form.busy} action="Save">
        <div className="grid gap-3 desk:grid-cols-3">
          <Field label="Name" error={errors.name} required className="desk:col-span-2">
            <TextInput
              maxLength={80}
              value={values.name}
              onChange={(event) => set('name', event.target.value)}
            />
          </Field>
          <Field label="Material">
            <Segmented
              value={values.material}
              onValue={(material: Material) => set('material', material)}
              choices={MATERIALS.map((value) => ({
                value,
                label: value === 'copper' ? 'Copper' : 'Aluminum',
              }))}
            />
          </Field>
          <Field label="Ohms are given">
            <Segmented
              value={values.per}
              onValue={(per: OhmsPer) => set('per', per)}
              choices={(['1000ft', 'km'] as const).map((value) => ({ value, label: PER_WORDS[value] }))}
            />
          </Field>
          {NUMBERS.map(({ field, label, hint }) => (
            <Field key={field} label={label} hint={hint} error={errors[field]}>
              <TextInput
                inputMode="decimal"
                maxLength={20}
                value={values[field]}
                onChange={(event) => set(field, event.target.value)}
              />
            </Field>
          ))}
          <Field label="Source of the figures" error={errors.source} required className="desk:col-span-3">
            <TextInput
              maxLength={400}
              value={values.source}
              onChange={(event) => set('source', event.target.value)}
            />
          </Field>
        </div>
      </Form>
    </Dialog>
  );
}
