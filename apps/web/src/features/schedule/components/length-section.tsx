import type { JobRows } from '@farlug/contract/rows';
import { type CircuitView, type ScheduleChange, setLengthEdit } from '@farlug/contract/schedule';
import { Field } from '../../../ui/field.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { SheetSection } from '../../../ui/side-sheet.tsx';
import { problemWords } from '../problem-words.ts';
import { RouteLength } from './route-length.tsx';
import { TypedField } from './typed-field.tsx';

interface LengthSectionProps {
  rows: JobRows;
  circuit: CircuitView;
  readOnly: boolean;
  onType: (text: string) => string | null;
  onApply: (change: ScheduleChange) => string | null;
}

const STATES = [
  { value: 'measured', label: 'Measured' },
  { value: 'scaled', label: 'Scaled' },
  { value: 'assumed', label: 'Assumed' },
] as const;

/** The length of a circuit's one run, how it was come by, and a way to work it out from a plan. */
export function LengthSection({ rows, circuit, readOnly, onType, onApply }: LengthSectionProps) {
  const [run] = circuit.runs;
  if (!run || circuit.runs.length > 1) return null;
  const unit = [...rows.job.values()][0]!.lengthUnit;
  const missing = circuit.next?.field === 'length';
  return (
    <SheetSection title="Length">
      <TypedField
        label="Length"
        hideLabel
        hint={missing ? circuit.next!.reason : "120 ft, 36 m, 120'"}
        text={circuit.fields.length.text}
        active={missing}
        readOnly={readOnly}
        onTake={(text) => {
          const problem = onType(text);
          return problem === null ? null : problemWords('Length', problem);
        }}
      />
      {run.length !== null && !circuit.fields.length.draft && (
        <Field label="How it was come by" className="mt-2">
          <Segmented
            wide
            value={run.lengthState}
            disabled={readOnly}
            onValue={(state) => onApply(setLengthEdit(rows, run.id, run.length!, state))}
            choices={STATES}
          />
        </Field>
      )}
      {!readOnly && (
        <RouteLength
          unit={unit}
          onTake={(length) => onApply(setLengthEdit(rows, run.id, length, 'scaled'))}
        />
      )}
    </SheetSection>
  );
}
