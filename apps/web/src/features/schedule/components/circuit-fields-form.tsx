import type { CircuitField, CircuitView } from '@farlug/contract/schedule';
import { LOAD_CLASSES } from '@farlug/solver/job';
import { CLASS_WORDS } from '../../../lib/job-words.ts';
import { Field } from '../../../ui/field.tsx';
import { Select } from '../../../ui/select.tsx';
import { problemWords } from '../problem-words.ts';
import { TypedField } from './typed-field.tsx';

const FIELDS: readonly (readonly [CircuitField, string, string | null])[] = [
  ['description', 'Serves', null],
  ['room', 'Room', null],
  ['length', 'Length', "120 ft, 36 m, 120'"],
  ['load', 'Load', '16 A, 1.5 kW, 180 VA, 3/4 hp'],
  ['size', 'Size', '12, 3/0, 250 kcmil, 16 mm2, 2 sets 3/0'],
  ['material', 'Material', 'copper or aluminum'],
  ['sets', 'Parallel sets', null],
  ['neutral', 'Neutral', 'same, none, or a size'],
  ['ground', 'Grounding conductor', 'a size'],
  ['raceway', 'Raceway', 'pvc, steel, aluminum, cable; 1/2" EMT'],
  ['spaces', 'Spaces', '7 or 1,3,5'],
  ['breaker', 'Breaker', '20, 30/2, 20A/1P'],
  ['powerFactor', 'Power factor', '0.85, 0.9 leading'],
  ['demand', 'Demand', '0.8, or a number of VA'],
  ['starting', 'Starting current', '96 A at 0.35'],
  ['loadType', 'Load type', null],
  ['notes', 'Notes', null],
];

interface FormProps {
  circuit: CircuitView;
  readOnly: boolean;
  onType: (field: CircuitField, text: string) => string | null;
}

/** Every field of a circuit, one under the other: for the phone, and for what has no column. */
export function CircuitFieldsForm({ circuit, readOnly, onType }: FormProps) {
  return (
    <div className="grid grid-cols-2 gap-x-3 gap-y-2">
      {FIELDS.filter(([field]) => field !== 'length' || circuit.runs.length > 1).map(
        ([field, label, hint]) => (
          <TypedField
            key={field}
            label={label}
            hint={circuit.next?.field === field ? circuit.next.reason : hint}
            className={field === 'description' || field === 'notes' ? 'col-span-2' : ''}
            text={circuit.fields[field].text}
            active={circuit.next?.field === field}
            readOnly={readOnly}
            onTake={(text) => {
              const problem = onType(field, text);
              return problem === null ? null : problemWords(label, problem);
            }}
          />
        ),
      )}
      <Field label="Class">
        <Select
          value={circuit.fields.class.text}
          disabled={readOnly || circuit.loads.length === 0}
          onValue={(value) => onType('class', value)}
          choices={[
            ...(LOAD_CLASSES.some((one) => one === circuit.fields.class.text)
              ? []
              : [{ value: circuit.fields.class.text, label: circuit.fields.class.text || 'no load' }]),
            ...LOAD_CLASSES.map((value) => ({ value: value as string, label: CLASS_WORDS[value] })),
          ]}
        />
      </Field>
      <Field label="Continuous" hint="125 % for ampacity and breaker only">
        <Select
          value={circuit.fields.continuous.text === 'yes' ? 'yes' : 'no'}
          disabled={readOnly || circuit.loads.length === 0}
          onValue={(value) => onType('continuous', value)}
          choices={[
            { value: 'no', label: 'No' },
            { value: 'yes', label: 'Yes, three hours or more' },
          ]}
        />
      </Field>
    </div>
  );
}
