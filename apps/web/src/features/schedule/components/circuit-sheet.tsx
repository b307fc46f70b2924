import type { JobRows } from '@farlug/contract/rows';
import type { CircuitField, CircuitView } from '@farlug/contract/schedule';
import { formatFixed, formatPercent, formatPercentAgainst } from '@farlug/solver/units';
import type { ReactNode } from 'react';
import { Button } from '../../../ui/button.tsx';
import { KeyFigures } from '../../../ui/key-values.tsx';
import { MissingBox } from '../../../ui/missing-box.tsx';
import { SheetSection, SideSheet } from '../../../ui/side-sheet.tsx';
import { VerdictSentence } from '../../../ui/verdict.tsx';
import type { CircuitFigures, JobResult } from '../../../workers/results.ts';
import { lineText, wireText } from '../columns.ts';
import { forceSentence, verdictSentence } from '../verdict-words.ts';
import { CircuitFieldsForm } from './circuit-fields-form.tsx';
import { LoadsTable } from './loads-table.tsx';
import { VoltsPath } from './volts-path.tsx';

interface CircuitSheetProps {
  rows: JobRows;
  circuit: CircuitView;
  result: JobResult | null;
  readOnly: boolean;
  onClose: () => void;
  onType: (field: CircuitField, text: string) => string | null;
  onDuplicate: () => void;
  onRemove: () => void;
  /** Sizes side by side and the hand check of the circuit's runs. */
  below: ReactNode;
  cautions: ReactNode;
}

/** What is known of the chosen circuit: sentence, picture, numbers, sizes, hand check, fields, cautions. */
export function CircuitSheet(props: CircuitSheetProps) {
  const { rows, circuit, result, readOnly, onClose, onType, below, cautions } = props;
  const job = [...rows.job.values()][0]!;
  const figures = result?.circuits.get(circuit.id) ?? null;
  const leftOut = result?.leftOut.find((one) => one.circuitId === circuit.id) ?? null;
  const { breaker, length, load } = circuit.fields;
  const about = [
    circuit.spaces.length > 0 ? `Space ${circuit.spaces.join(', ')} on ${lineText(circuit)}` : null,
    breaker.text && `breaker ${breaker.text}`,
    wireText(circuit) &&
      `${wireText(circuit)}${circuit.fields.raceway.text ? ` in ${circuit.fields.raceway.text}` : ''}`,
    length.text && `${length.text}${length.assumed ? ', assumed' : ''}`,
    load.text && `${load.text}${load.assumed ? ', assumed' : ''}`,
  ].filter(Boolean);
  return (
    <SideSheet
      title={
        <>
          {circuit.code} <span className="font-normal">{circuit.fields.description.text}</span>
        </>
      }
      subtitle={about.join('. ')}
      onClose={onClose}
    >
      {leftOut && (
        <SheetSection>
          <VerdictSentence kind="unjudged" lead="Left out of the results.">
            {leftOut.reason}
          </VerdictSentence>
          {circuit.next && <MissingBox what={circuit.next.field ?? 'a value'} />}
        </SheetSection>
      )}
      {figures && !leftOut && <Figures figures={figures} job={job} counted={job} />}
      {figures && figures.loads.length > 1 && (
        <SheetSection title="Its loads, each at its worst">
          <LoadsTable loads={figures.loads} />
        </SheetSection>
      )}
      {below}
      <SheetSection title="Fields">
        <CircuitFieldsForm circuit={circuit} readOnly={readOnly} onType={onType} />
        {!readOnly && (
          <div className="mt-3 flex gap-2">
            <Button onClick={props.onDuplicate}>Duplicate</Button>
            <Button look="danger" onClick={props.onRemove}>
              Delete
            </Button>
          </div>
        )}
      </SheetSection>
      <SheetSection>{cautions}</SheetSection>
    </SideSheet>
  );
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
