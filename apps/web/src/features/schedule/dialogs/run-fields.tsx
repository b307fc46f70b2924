import type { LengthUnit } from '@farlug/solver/job';
import { INSTALLATION_METHODS, PROTECTIONS, type Protection } from '@farlug/solver/job';
import type { FieldErrors } from '../../../lib/form-errors.ts';
import { Checkbox } from '../../../ui/checkbox.tsx';
import { Field } from '../../../ui/field.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { Select } from '../../../ui/select.tsx';
import { type Echo, echoBreaker, echoLength, echoSize, echoTemperature } from './echoes.ts';
import type { RunTexts } from './run-draft.ts';
import { TypedInput } from './typed-input.tsx';

interface RunFieldsProps {
  texts: RunTexts;
  errors: FieldErrors;
  lengthUnit: LengthUnit;
  metric: boolean;
  onTexts: (texts: RunTexts) => void;
  /** A breaker of the run's own: where no circuit has it. */
  ownBreaker: boolean;
}

const PROTECTION_WORDS: Record<Protection, string> = {
  general: 'General rule, NEC 240.4',
  motor: 'Motor circuit: not checked here',
  transformer: 'Transformer circuit: not checked here',
  tap: 'Tap: not checked here',
  'dwelling-83': 'Dwelling service, 83 % rule: not checked here',
};
const STATE_WORDS = [
  { value: '', label: 'not said' },
  { value: 'measured', label: 'measured' },
  { value: 'scaled', label: 'off the plan' },
  { value: 'assumed', label: 'assumed' },
] as const;

/** The fields of a run that are needed first: length, conductors, raceway. */
export function RunFields({ texts, errors, lengthUnit, metric, onTexts, ownBreaker }: RunFieldsProps) {
  const set = (fields: Partial<RunTexts>) => onTexts({ ...texts, ...fields });
  const text = (field: keyof RunTexts, label: string, hint: string | null, echo?: Echo) => (
    <TypedInput
      label={label}
      hint={hint}
      echo={echo}
      lengthUnit={lengthUnit}
      value={texts[field]}
      error={errors[`run.${field}`]}
      onText={(typed) => set({ [field]: typed })}
    />
  );
  return (
    <>
      {text(
        'length',
        'Length, one way',
        lengthUnit === 'ft' ? '120 ft, 36 m, 118\' 6"' : '36 m, 120 ft',
        echoLength,
      )}
      <Field label="The length is" hint="An assumed length is marked wherever it counts.">
        <Select
          value={texts.lengthState}
          onValue={(lengthState) => set({ lengthState })}
          choices={STATE_WORDS.map((one) => ({ ...one }))}
        />
      </Field>
      {text(
        'size',
        'Size of the lines',
        metric ? '16, 95 mm2, 2 x 120' : '3/0, 250 kcmil, 2 sets 3/0',
        echoSize,
      )}
      {text('sets', 'Parallel sets', 'Sets of conductors side by side.')}
      <Field label="Material" error={errors['run.material']}>
        <Segmented
          value={texts.material}
          onValue={(material) => set({ material })}
          choices={[
            { value: 'copper', label: 'Copper' },
            { value: 'aluminum', label: 'Aluminum' },
          ]}
        />
      </Field>
      {text('neutral', 'Neutral', 'same, none, or a size of its own')}
      {text('ground', 'Grounding conductor', metric ? 'a size, such as 16' : 'a size, such as 6', echoSize)}
      {text('raceway', 'Raceway', 'pvc, aluminum, steel or cable; 2" EMT')}
      {ownBreaker && text('breaker', 'Breaker', '200, 200/3', echoBreaker)}
      {text('demand', 'Demand of what lies beyond', '0.8 or 80 %: the share that flows in it at one time')}
    </>
  );
}

/** What is asked less often: how it lies, what its insulation stands, who decided against the floor. */
export function RunFurtherFields({ texts, errors, metric, onTexts }: Omit<RunFieldsProps, 'ownBreaker'>) {
  const set = (fields: Partial<RunTexts>) => onTexts({ ...texts, ...fields });
  const text = (field: keyof RunTexts, label: string, hint: string | null, echo?: Echo) => (
    <TypedInput
      label={label}
      hint={hint}
      echo={echo}
      value={texts[field]}
      error={errors[`run.${field}`]}
      onText={(typed) => set({ [field]: typed })}
    />
  );
  return (
    <>
      {text('name', 'Its name', 'As it is to stand in the report.')}
      {text('ambient', 'Ambient', '30 °C, 86 °F', echoTemperature)}
      <Field label="Insulation, rated" error={errors['run.insulation']}>
        <Select
          value={texts.insulation}
          onValue={(insulation) => set({ insulation })}
          choices={rated(metric ? ['70', '90'] : ['60', '75', '90'], texts.insulation)}
        />
      </Field>
      <Field
        label="Terminals, rated"
        error={errors['run.terminals']}
        hint="Not said: 60 °C to 100 A, 75 °C above (110.14(C))."
      >
        <Select
          value={texts.terminals}
          onValue={(terminals) => set({ terminals })}
          choices={rated(['60', '75', '90'], texts.terminals)}
        />
      </Field>
      {text('bundled', 'Current-carrying conductors', 'In the same raceway or bundle; empty: its own.')}
      {text(
        'temperature',
        'Conductor temperature',
        '75 °C, or operating: found with its current',
        echoTemperature,
      )}
      {metric && (
        <Field
          label="Installation method"
          error={errors['run.method']}
          hint="IEC 60364-5-52 Table B.52.1; without it the ampacity floor is not checked."
        >
          <Select
            value={texts.method}
            onValue={(method) => set({ method })}
            choices={[
              { value: '', label: 'not said' },
              ...INSTALLATION_METHODS.map((value) => ({ value: value as string, label: value })),
            ]}
          />
        </Field>
      )}
      <Field label="Protection" error={errors['run.protection']}>
        <Select
          value={texts.protection}
          onValue={(protection) => set({ protection })}
          choices={PROTECTIONS.map((value) => ({ value: value as string, label: PROTECTION_WORDS[value] }))}
        />
      </Field>
      {text(
        'floorOverride',
        'Reason for a size below the ampacity floor',
        'Printed wherever the number is printed.',
      )}
      {text('notes', 'Notes', null)}
      <Checkbox
        checked={texts.locked === 'yes'}
        onChecked={(locked) => set({ locked: locked ? 'yes' : 'no' })}
        label="Keep this size"
        hint="The sizing of the whole job leaves it as it is."
      />
      <Checkbox
        checked={texts.open === 'yes'}
        onChecked={(open) => set({ open: open ? 'yes' : 'no' })}
        label="Open: switched off"
        hint="What only it reaches is then not served."
      />
    </>
  );
}

/** Ratings to choose from; one that the row has already stays among them. */
const rated = (values: readonly string[], own: string) => [
  { value: '', label: 'not said' },
  ...[...new Set([...values, own])]
    .filter((value) => value !== '')
    .map((value) => ({ value, label: `${value} °C` })),
];

const FURTHER: readonly (keyof RunTexts)[] = [
  'name',
  'ambient',
  'insulation',
  'terminals',
  'bundled',
  'temperature',
  'floorOverride',
  'notes',
];
/** Whether a field that stands folded is wrong. */
export const furtherWrong = (errors: Readonly<Record<string, string>>): boolean =>
  FURTHER.some((field) => errors[`run.${field}`]);
