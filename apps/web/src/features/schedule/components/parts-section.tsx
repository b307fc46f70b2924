import type { JobRows } from '@farlug/contract/rows';
import { type CircuitView, changeRowFieldEdit, type ScheduleChange } from '@farlug/contract/schedule';
import { formatFixed, formatPercent } from '@farlug/solver/units';
import { SheetSection } from '../../../ui/side-sheet.tsx';
import { VerdictFigure } from '../../../ui/verdict.tsx';
import type { JobResult } from '../../../workers/results.ts';
import { runText } from '../columns.ts';
import { problemWords } from '../problem-words.ts';
import { TypedField } from './typed-field.tsx';

interface PartsSectionProps {
  rows: JobRows;
  circuit: CircuitView;
  result: JobResult | null;
  readOnly: boolean;
  onApply: (change: ScheduleChange) => string | null;
}

/** The single runs and loads of a circuit that has several: each with its own length or size and its own figures. */
export function PartsSection({ rows, circuit, result, readOnly, onApply }: PartsSectionProps) {
  const drafts = new Map([...rows.draft.values()].map((one) => [`${one.rowId} ${one.field}`, one.text]));
  const textOf = (id: string, field: string, value: string | null) =>
    drafts.get(`${id} ${field}`) ?? value ?? '';
  return (
    <>
      {circuit.runs.length > 1 && (
        <SheetSection title="Its segments, from the panel outward">
          {circuit.runs.map((run) => (
            <TypedField
              key={run.id}
              label={`${run.code}, ${runText(run)}`}
              hint={null}
              text={textOf(run.id, 'length', run.length)}
              readOnly={readOnly}
              onTake={(text) =>
                told('Length', onApply(changeRowFieldEdit(rows, 'run', run.id, 'length', text)))
              }
            />
          ))}
        </SheetSection>
      )}
      {circuit.loads.length > 1 && (
        <SheetSection title="Its loads, each at its worst">
          {circuit.loads.map((load) => {
            const figures = result?.loads.get(load.id);
            return (
              <div key={load.id} className="grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-3">
                <TypedField
                  label={`${load.name ?? load.code}, ${load.terminals}`}
                  hint={null}
                  text={textOf(load.id, 'size', load.size)}
                  readOnly={readOnly}
                  onTake={(text) =>
                    told('Load', onApply(changeRowFieldEdit(rows, 'load', load.id, 'size', text)))
                  }
                />
                <span className="pt-5 text-right text-grid">
                  {figures && (
                    <>
                      {figures.volts !== null && `${formatFixed(figures.volts, 1)} V `}
                      <VerdictFigure kind={figures.shown}>
                        {figures.totalPercent === null ? '' : formatPercent(figures.totalPercent, 2)}
                      </VerdictFigure>
                    </>
                  )}
                </span>
              </div>
            );
          })}
        </SheetSection>
      )}
    </>
  );
}

const told = (label: string, problem: string | null) =>
  problem === null ? null : problemWords(label, problem);
