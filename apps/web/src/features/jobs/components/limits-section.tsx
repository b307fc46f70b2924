import { FORCES, type Force } from '@farlug/solver/job';
import { FORCE_WORDS, LIMIT_WORDS } from '../../../lib/job-words.ts';
import { Checkbox } from '../../../ui/checkbox.tsx';
import { Field } from '../../../ui/field.tsx';
import { FormSection } from '../../../ui/form-section.tsx';
import { Select } from '../../../ui/select.tsx';
import { type LimitsDraft, PLAIN_LIMITS } from '../job-draft.ts';
import { isOwn, limitsOfPreset, type Preset } from '../limits-of-preset.ts';
import { ClassLimits } from './class-limits.tsx';
import { type DraftForm, DraftText, type LimitsForm, NumberField } from './draft-fields.tsx';
import { VoltsLimits } from './volts-limits.tsx';

const OWN = 'Your firm';
const CODES = 'Codes and standards';
const groundOf = ({ clause, edition, standing, verified }: Preset) =>
  [clause, edition, standing, verified && `figures ${verified}`].filter(Boolean).join('; ');

const INCLUDES = [
  ['includeService', 'Service conductors'],
  ['includeTransformer', 'Transformers'],
  ['includeSource', 'The source’s own impedance'],
] as const;

/** From a preset that names its clause, or typed; changing a figure of a preset makes it typed. */
export function LimitsSection({ form, presets }: { form: DraftForm; presets: readonly Preset[] }) {
  const { values } = form;
  const chosen = presets.find((preset) => preset.name === values.preset);
  const typed = () => {
    if (values.preset !== '') form.set('preset', '');
  };
  const take = (name: string) => {
    form.set('preset', name);
    const preset = presets.find((entry) => entry.name === name);
    if (!preset) return;
    const taken = limitsOfPreset(preset);
    for (const field of Object.keys(taken) as (keyof LimitsDraft)[]) form.set(field, taken[field]);
  };
  return (
    <>
      <FormSection
        title="Limits"
        note="How far the volts may fall. Ask which electrical and which energy code is adopted, in which edition."
      >
        <Field label="Preset" className="desk:col-span-2" hint={chosen && groundOf(chosen)}>
          <Select
            value={chosen ? chosen.name : ''}
            onValue={take}
            choices={[
              { value: '', label: 'Typed here' },
              ...presets.map((preset) => ({
                value: preset.name,
                label: preset.name,
                group: isOwn(preset) ? OWN : CODES,
              })),
            ]}
          />
        </Field>
        <DraftText
          form={form}
          field="limitBasis"
          label="Ground: clause or house rule"
          hint="Printed wherever the limits stand."
          className="desk:col-span-2"
        />
      </FormSection>
      <LimitFigures form={form} onTyped={typed} />
    </>
  );
}

const nothing = () => {};

/** Figures, what the total counts, and the limits of classes and voltages: of a job and of a preset. */
export function LimitFigures({ form, onTyped: typed = nothing }: { form: LimitsForm; onTyped?: () => void }) {
  const { values } = form;
  return (
    <>
      <FormSection title="Figures" note="Percent of nominal volts. An empty field is no limit." columns={3}>
        <Field label="Force" className="desk:col-span-3">
          <Select
            value={values.limitForce}
            onValue={(force: Force) => {
              typed();
              form.set('limitForce', force);
            }}
            choices={FORCES.map((force) => ({ value: force, label: FORCE_WORDS[force] }))}
          />
        </Field>
        {PLAIN_LIMITS.map((kind) => (
          <NumberField
            key={kind}
            label={`${LIMIT_WORDS[kind].label}, ${LIMIT_WORDS[kind].unit}`}
            hint={LIMIT_WORDS[kind].hint}
            error={form.errors[`limits.${kind}`]}
            value={values.limits[kind]}
            onText={(text) => {
              typed();
              form.set('limits', { ...values.limits, [kind]: text });
            }}
          />
        ))}
      </FormSection>
      <FormSection title="What the total counts" note="Feeder and branch always count." columns={2}>
        {INCLUDES.map(([field, label]) => (
          <Checkbox
            key={field}
            checked={values[field]}
            onChecked={(checked) => {
              typed();
              form.set(field, checked);
            }}
            label={label}
          />
        ))}
        <Checkbox
          checked={values.longRun}
          onChecked={(checked) => {
            typed();
            form.set('longRun', checked);
          }}
          label="Allow long runs more"
          hint="0.005 % per metre beyond 100 m, at most 0.5 % (IEC 60364-5-52 Annex G)."
        />
      </FormSection>
      <ClassLimits form={form} onTyped={typed} />
      <VoltsLimits form={form} onTyped={typed} />
    </>
  );
}
