import type { JobRows } from '@farlug/contract/rows';
import type { CircuitField, CircuitView, ScheduleChange } from '@farlug/contract/schedule';
import { formatFixed, formatPercent, formatPercentAgainst } from '@farlug/solver/units';
import type { ReactNode } from 'react';
import { Button } from '../../../ui/button.tsx';
import { KeyFigures } from '../../../ui/key-values.tsx';
import { SheetSection, SideSheet } from '../../../ui/side-sheet.tsx';
import { DESK, useMedia } from '../../../ui/use-media.ts';
import { VerdictSentence } from '../../../ui/verdict.tsx';
import type { CircuitFigures, JobResult } from '../../../workers/results.ts';
import { breakerText, lineText, wireText } from '../columns.ts';
import { forceSentence, verdictSentence } from '../verdict-words.ts';
import { CircuitFieldsForm } from './circuit-fields-form.tsx';
import { PartsSection } from './parts-section.tsx';
import { VoltsPath } from './volts-path.tsx';
import { WiringMenu } from './wiring-menu.tsx';

interface CircuitSheetProps {
  rows: JobRows;
  circuit: CircuitView;
  result: JobResult | null;
  readOnly: boolean;
  onClose: () => void;
  onType: (field: CircuitField, text: string) => string | null;
  /** What was wrong; null where it was taken. */
  onApply: (change: ScheduleChange) => string | null;
  onDuplicate: () => void;
  onRemove: () => void;
  /** The way to the next row that lacks something. */
  next: ReactNode;
  sizesFor: ((runRowId: string) => ReactNode) | undefined;
  handCheckFor: ((runRowId: string) => ReactNode) | undefined;
  cautions: ReactNode;
}

/** What is known of the chosen circuit: sentence, picture, numbers, sizes, hand check, fields, cautions. */
export function CircuitSheet(props: CircuitSheetProps) {
  const { rows, circuit, result, readOnly, onClose, onType, onApply, next, cautions } = props;
  const desk = useMedia(DESK);
  const job = [...rows.job.values()][0]!;
  const figures = result?.circuits.get(circuit.id) ?? null;
  const leftOut = result?.leftOut.find((one) => one.circuitId === circuit.id) ?? null;
  const [run] = circuit.runs;
  const below = run && (
    <>
      {props.sizesFor?.(run.id)}
      {props.handCheckFor?.(run.id)}
    </>
  );
  const fields = (
    <>
      <SheetSection title="Fields">
        <CircuitFieldsForm circuit={circuit} readOnly={readOnly} onType={onType} />
      </SheetSection>
      {!readOnly && (
        <SheetSection>
          <div className="flex flex-wrap items-center gap-2">
            <Button onClick={props.onDuplicate}>Duplicate</Button>
            <WiringMenu rows={rows} circuit={circuit} onApply={onApply} />
            <Button look="danger" onClick={props.onRemove}>
              Delete
            </Button>
          </div>
          {next && <p className="mt-2">{next}</p>}
        </SheetSection>
      )}
    </>
  );
  return (
    <SideSheet
      title={
        <>
          {circuit.code} <span className="font-normal">{circuit.fields.description.text}</span>
        </>
      }
      subtitle={aboutCircuit(circuit)}
      onClose={onClose}
    >
      {leftOut && (
        <SheetSection>
          <VerdictSentence kind="unjudged" lead="Left out of the results.">
            {leftOut.reason}
          </VerdictSentence>
        </SheetSection>
      )}
      {figures && !leftOut && <Figures figures={figures} job={job} counted={job} />}
      {!desk && fields}
      {(circuit.loads.length > 1 || circuit.runs.length > 1) && (
        <PartsSection rows={rows} circuit={circuit} result={result} readOnly={readOnly} onApply={onApply} />
      )}
      {below}
      {desk && fields}
      <SheetSection>{cautions}</SheetSection>
    </SideSheet>
  );
}

/** `Space 27 on L2. Breaker 20. 10 Cu in EMT. 118 ft, measured`. */
function aboutCircuit(circuit: CircuitView): string {
  const { breaker, length, load, raceway } = circuit.fields;
  const wire = wireText(circuit);
  const state = circuit.runs[0]?.lengthState ?? null;
  return [
    circuit.spaces.length > 0 ? `Space ${circuit.spaces.join(', ')} on ${lineText(circuit)}` : null,
    breaker.text && `Breaker ${breakerText(circuit)}`,
    wire && `${wire}${raceway.text ? ` in ${raceway.text}` : ''}`,
    length.text && `${length.text}${state ? `, ${state}` : ''}`,
    load.text && `${load.text}${load.assumed ? ', assumed' : ''}`,
  ]
    .filter(Boolean)
    .join('. ');
}

interface FiguresProps {
  figures: CircuitFigures;
  job: { limitForce: 'recommendation' | 'mandatory'; limitBasis: string | null };
  counted: { includeSource: boolean; includeService: boolean; includeTransformer: boolean };
}

function Figures({ figures, job, counted }: FiguresProps) {
  const { worst, shown } = figures;
  const total = worst.totalPercent;
  const sentence = verdictSentence(
    shown,
    worst.reasons,
    total === null ? '' : formatPercentAgainst(total, worst.limitPercent),
    worst.limitPercent === null ? null : formatPercent(worst.limitPercent, 2),
  );
  const force = forceSentence(shown, job.limitForce, job.limitBasis);
  return (
    <>
      <SheetSection>
        <VerdictSentence kind={shown} lead={sentence.lead}>
          {sentence.rest}
        </VerdictSentence>
        {force && <p className="mt-1 text-label text-ink-soft">{force}</p>}
      </SheetSection>
      {worst.dropVolts !== null && (
        <SheetSection title={`Where the ${formatFixed(worst.dropVolts, 2)} volts go, service to far lug`}>
          <VoltsPath
            load={worst}
            counted={{
              source: counted.includeSource,
              service: counted.includeService,
              transformer: counted.includeTransformer,
            }}
          />
        </SheetSection>
      )}
      {worst.volts !== null && (
        <SheetSection>
          <KeyFigures
            columns={2}
            items={[
              ['At the far lug', `${formatFixed(worst.volts, 1)} V`],
              [
                'Headroom',
                worst.headroomAmps === null ? 'no limit' : `${formatFixed(worst.headroomAmps, 1)} A`,
              ],
              ['Between', worst.terminals],
              [
                'While starting',
                worst.startingPercent === null ? 'not stated' : formatPercent(worst.startingPercent, 1),
              ],
            ]}
          />
        </SheetSection>
      )}
    </>
  );
}
