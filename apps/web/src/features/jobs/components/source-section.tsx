import type { System } from '@farlug/solver/job';
import { SYSTEM_FAULT, SYSTEM_ORDER, SYSTEM_VOLTS, SYSTEM_WORDS } from '../../../lib/job-words.ts';
import { Checkbox } from '../../../ui/checkbox.tsx';
import { Field } from '../../../ui/field.tsx';
import { FormSection } from '../../../ui/form-section.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { Select } from '../../../ui/select.tsx';
import type { SourceDraft, Strength } from '../job-draft.ts';
import { type DraftForm, NumberField } from './draft-fields.tsx';

const STRENGTH_WORDS: Record<Strength, string> = {
  fault: 'Fault current',
  impedance: 'Impedance',
  stiff: 'Not stated',
};

interface SourceSectionProps {
  form: DraftForm;
  index: number;
  /** The system of a source that already feeds something is not changed here. */
  systemLocked?: boolean;
}

export function SourceSection({ form, index, systemLocked = false }: SourceSectionProps) {
  const source = form.values.sources[index]!;
  const change = (fields: Partial<SourceDraft>) =>
    form.set(
      'sources',
      form.values.sources.map((entry, i) => (i === index ? { ...entry, ...fields } : entry)),
    );
  const error = (field: keyof SourceDraft) => form.errors[`sources.${index}.${field}`];
  const { between, example } = SYSTEM_VOLTS[source.system];
  const direct = source.system === 'dc-2w';
  return (
    <FormSection
      title={index === 0 ? 'Service' : `Source ${source.code}`}
      note="What the utility, transformer or battery offers at its terminals. For a motor’s start the lowest fault current matters: ask for it."
    >
      <Field
        label="Supply system"
        hint={systemLocked ? 'Circuits hang on it: a job with another system is a new job.' : undefined}
        className="desk:col-span-2"
      >
        <Select
          value={source.system}
          disabled={systemLocked}
          onValue={(system: System) => change({ system })}
          choices={SYSTEM_ORDER.map((system) => ({ value: system, label: SYSTEM_WORDS[system] }))}
        />
      </Field>
      <NumberField
        label={`Nominal volts, ${between}`}
        hint={`As ${example}.`}
        required
        error={error('volts')}
        value={source.volts}
        onText={(volts) => change({ volts })}
      />
      <NumberField
        label="Volts at no load, if known"
        hint="What the meter shows with everything off."
        error={error('openVolts')}
        value={source.openVolts}
        onText={(openVolts) => change({ openVolts })}
      />
      {index === 0 && !direct && (
        <NumberField
          label="Frequency, Hz"
          error={form.errors.frequency}
          value={form.values.frequency}
          onText={(frequency) => form.set('frequency', frequency)}
        />
      )}
      <Field
        label="Behind the terminals"
        className="desk:col-span-2"
        hint={
          source.strength === 'stiff'
            ? 'Taken as unyielding: starting is then not judged, and the source adds no drop.'
            : undefined
        }
      >
        <Segmented
          value={source.strength}
          onValue={(strength) => change({ strength })}
          choices={(['fault', 'impedance', 'stiff'] as const).map((value) => ({
            value,
            label: STRENGTH_WORDS[value],
          }))}
        />
      </Field>
      {source.strength === 'fault' && (
        <>
          <NumberField
            label={SYSTEM_FAULT[source.system]}
            hint="Amps, or with its unit, as 22 kA."
            required
            error={error('faultAmps')}
            value={source.faultAmps}
            onText={(faultAmps) => change({ faultAmps })}
          />
          {!direct && (
            <NumberField
              label="X/R"
              hint="0 where it is not known: all resistance."
              error={error('faultXOverR')}
              value={source.faultXOverR}
              onText={(faultXOverR) => change({ faultXOverR })}
            />
          )}
        </>
      )}
      {source.strength === 'impedance' && (
        <>
          <NumberField
            label="R of each line, ohm"
            required
            error={error('impedanceR')}
            value={source.impedanceR}
            onText={(impedanceR) => change({ impedanceR })}
          />
          {!direct && (
            <NumberField
              label="X of each line, ohm"
              error={error('impedanceX')}
              value={source.impedanceX}
              onText={(impedanceX) => change({ impedanceX })}
            />
          )}
        </>
      )}
      {index > 0 && (
        <Checkbox
          checked={source.off}
          onChecked={(off) => change({ off })}
          label="Off"
          hint="What only it reaches is then not served."
        />
      )}
    </FormSection>
  );
}
