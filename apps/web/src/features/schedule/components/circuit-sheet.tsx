import type { JobRows } from '@farlug/contract/rows';
import type { CircuitField, CircuitView, ScheduleChange } from '@farlug/contract/schedule';
import type { ReactNode } from 'react';
import { Button } from '../../../ui/button.tsx';
import { SheetSection, SideSheet } from '../../../ui/side-sheet.tsx';
import { DESK, useMedia } from '../../../ui/use-media.ts';
import { VerdictSentence } from '../../../ui/verdict.tsx';
import type { JobResult } from '../../../workers/results.ts';
import { breakerText, lineText, wireText } from '../columns.ts';
import { CircuitFieldsForm } from './circuit-fields-form.tsx';
import { LengthSection } from './length-section.tsx';
import { PartsSection } from './parts-section.tsx';
import { PathSection } from './path-section.tsx';
import { VerdictSection } from './verdict-section.tsx';
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
      <LengthSection
        rows={rows}
        circuit={circuit}
        readOnly={readOnly}
        onType={(text) => onType('length', text)}
        onApply={onApply}
      />
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
  const path = figures && !leftOut && (
    <PathSection
      worst={figures.worst}
      lossWatts={result?.runs.get(run?.id ?? '')?.lossWatts ?? null}
      job={job}
    />
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
      {figures && !leftOut && <VerdictSection figures={figures} job={job} />}
      {desk && path}
      {!desk && fields}
      {(circuit.loads.length > 1 || circuit.runs.length > 1) && (
        <PartsSection rows={rows} circuit={circuit} result={result} readOnly={readOnly} onApply={onApply} />
      )}
      {!desk && path}
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
