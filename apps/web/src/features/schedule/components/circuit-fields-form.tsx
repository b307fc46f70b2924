import type { CircuitField, CircuitView } from '@farlug/contract/schedule';
import { LOAD_CLASSES } from '@farlug/solver/job';
import { useEffect, useRef, useState } from 'react';
import { CLASS_WORDS } from '../../../lib/job-words.ts';
import { Field } from '../../../ui/field.tsx';
import { Select } from '../../../ui/select.tsx';
import { TextInput } from '../../../ui/text-input.tsx';

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
      {FIELDS.map(([field, label, hint]) => (
        <TypedField
          key={field}
          label={label}
          hint={hint}
          wide={field === 'description' || field === 'notes'}
          text={circuit.fields[field].text}
          missing={circuit.next?.field === field ? circuit.next.reason : null}
          readOnly={readOnly}
          onTake={(text) => onType(field, text)}
        />
      ))}
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

interface TypedFieldProps {
  label: string;
  hint: string | null;
  wide: boolean;
  text: string;
  missing: string | null;
  readOnly: boolean;
  onTake: (text: string) => string | null;
}

/** Taken when it is left or Enter is pressed; what is not understood stays, with the reason. */
function TypedField({ label, hint, wide, text, missing, readOnly, onTake }: TypedFieldProps) {
  const [typed, setTyped] = useState(text);
  const [problem, setProblem] = useState<string | null>(null);
  const shown = useRef(text);
  useEffect(() => {
    if (shown.current === text) return;
    shown.current = text;
    setTyped(text);
  }, [text]);
  const take = () => {
    if (typed !== text) setProblem(onTake(typed));
  };
  return (
    <Field label={label} hint={missing ?? hint} error={problem} className={wide ? 'col-span-2' : ''}>
      <TextInput
        value={typed}
        maxLength={400}
        readOnly={readOnly}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={take}
        onKeyDown={(event) => {
          if (event.key === 'Enter') take();
        }}
      />
    </Field>
  );
}
