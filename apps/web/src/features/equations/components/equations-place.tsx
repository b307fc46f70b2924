import { scheduleView } from '@farlug/contract/schedule';
import type { Equations } from '@farlug/solver/equations';
import { type ReactNode, useMemo, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { useReplica } from '../../../job/open-job.tsx';
import { useAnswer, useResult } from '../../../job/use-result.ts';
import { formatNumber } from '../../../lib/format.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { Field } from '../../../ui/field.tsx';
import { Message } from '../../../ui/message.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { Select } from '../../../ui/select.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { EquationList } from './equation-list.tsx';
import { EquationMatrix } from './equation-matrix.tsx';
import { NamedTable } from './named-table.tsx';

type Form = 'numbers' | 'names' | 'matrix';
const FORMS: readonly { value: Form; label: string }[] = [
  { value: 'numbers', label: 'With numbers' },
  { value: 'names', label: 'In names' },
  { value: 'matrix', label: 'As a matrix' },
];

const STATE_WORDS: Record<Equations['scenario'], string> = {
  design: 'design demand',
  'everything-on': 'everything on',
  light: 'light load',
};

/** The node equations of one panel, written out so that they can be worked again by hand. */
export function EquationsPlace({
  cautions,
  handCheckFor,
}: {
  cautions: ReactNode;
  handCheckFor?: (runs: string[]) => ReactNode;
}) {
  const { rows } = useReplica();
  const { fault } = useResult();
  const [params, setParams] = useSearchParams();
  const [form, setForm] = useState<Form>('numbers');
  const panels = useMemo(() => scheduleView(rows).panels, [rows]);
  usePageTitle('Equations', [...rows.job.values()][0]?.name);
  const panel = panels.find((one) => one.id === params.get('panel')) ?? panels[0];
  const answer = useAnswer(panel ? { kind: 'equations', panel: panel.id } : null);
  if (!panel)
    return (
      <EmptyState level="h1" title="No panel yet">
        The node equations of a panel stand here once there is one.
      </EmptyState>
    );
  return (
    <Scroller label="Equations, scrolls" className="min-h-0 flex-1 overflow-auto bg-sheet">
      <PageHeading
        title={`Node equations at ${panel.code}`}
        aside={panel.bus.name}
        detail="At every node the currents that leave by runs, windings and loads add up to nothing. Written by inspection: own admittance times own voltage, less each joining admittance times its neighbour’s voltage, equals the current that flows in."
      />
      <div className="flex flex-wrap items-end gap-x-6 gap-y-2 border-b border-rule px-4 pb-3">
        <Field label="Panel" className="w-full desk:w-64">
          <Select
            value={panel.id}
            onValue={(value) =>
              setParams(
                (before) => {
                  const after = new URLSearchParams(before);
                  after.set('panel', value);
                  return after;
                },
                { replace: true },
              )
            }
            choices={panels.map((one) => ({
              value: one.id,
              label: `${one.code} ${one.bus.name ?? ''}`.trim(),
            }))}
          />
        </Field>
        <Segmented label="Form" value={form} onValue={setForm} choices={FORMS} />
      </div>
      {fault ? (
        <Message kind="wrong">
          The solver stopped: {fault}. Nothing that was typed is lost; reload the page to go on.
        </Message>
      ) : answer === null ? (
        <Skeleton rows={8} label="Writing the equations" />
      ) : answer.kind === 'none' ? (
        <Message kind="note">{answer.reason}</Message>
      ) : (
        <>
          <p className="px-4 pt-3 text-grid">
            State written out: {STATE_WORDS[answer.equations.scenario]}. Kirchhoff’s current law closes to{' '}
            <b>{answer.equations.kclResidual === 0 ? '0' : answer.equations.kclResidual.toExponential(1)}</b>{' '}
            of the largest current; the whole matrix has a condition number of about{' '}
            <b>{formatNumber(Number(answer.equations.condition.toPrecision(1)))}</b>.
          </p>
          {form === 'matrix' ? (
            <EquationMatrix equations={answer.equations} />
          ) : (
            <EquationList equations={answer.equations.equations} form={form} />
          )}
          <NamedTable
            caption="Voltages of the nodes around, volt"
            items={answer.equations.neighbours}
            unit="V"
          />
          <NamedTable caption="Impedances, ohm" items={answer.equations.impedances} unit="Ω" />
          <NamedTable caption="Currents, ampere" items={answer.equations.currents} unit="A" />
        </>
      )}
      {handCheckFor && (
        <div className="max-w-200">
          {handCheckFor(panel.circuits.flatMap((circuit) => circuit.runs.map((run) => run.id)))}
        </div>
      )}
      <div className="border-t border-rule px-4 py-3">{cautions}</div>
    </Scroller>
  );
}
