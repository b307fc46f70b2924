import { formatAmps } from '@farlug/solver/units';
import { type ReactNode, useState } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { useAnswer, useResult, useScenario } from '../../../job/use-result.ts';
import { SCENARIO_WORDS } from '../../../lib/job-words.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Button } from '../../../ui/button.tsx';
import { Checkbox } from '../../../ui/checkbox.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { Field } from '../../../ui/field.tsx';
import { Message } from '../../../ui/message.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { Select } from '../../../ui/select.tsx';
import { Skeleton } from '../../../ui/skeleton.tsx';
import { runChoices, runName } from '../run-choices.ts';
import { SizesChart } from './sizes-chart.tsx';
import { SizesTable } from './sizes-table.tsx';

const SETS = ['1', '2', '3', '4'] as const;

/** Every size of one run beside the others: what it drops, what it loses, what it may carry, what it mends. */
export function SizesPlace({
  cautions,
  handCheckFor,
}: {
  cautions: ReactNode;
  handCheckFor?: (run: string) => ReactNode;
}) {
  const { firm, job, archived, replica } = useOpenJob();
  const { rows, undo } = useReplica();
  const { result, solving, fault } = useResult();
  const [scenario] = useScenario();
  const [params, setParams] = useSearchParams();
  const [both, setBoth] = useState(false);
  const [sets, setSets] = useState<(typeof SETS)[number]>('1');
  const [problem, setProblem] = useState<string | null>(null);
  const jobRow = [...rows.job.values()][0]!;
  usePageTitle('Sizes', jobRow.name);
  const choices = runChoices(rows, result);
  const chosen = params.get('run') ?? choices[0]?.value ?? null;
  const run = chosen === null ? undefined : rows.run.get(chosen);
  const answer = useAnswer(
    run ? { kind: 'sizes', run: run.id, bothMaterials: both, maxSets: Number(sets) } : null,
  );

  const takeBack = () => {
    const done = replica.undo();
    setProblem(done.ok ? null : done.message);
  };

  if (choices.length === 0)
    return (
      <EmptyState level="h1" title="No run yet">
        Runs appear here with the <Link to={paths.schedule(firm, job)}>schedule’s</Link> circuits and feeders.
      </EmptyState>
    );
  return (
    <Scroller label="Sizes, scrolls" className="min-h-0 flex-1 overflow-auto bg-sheet">
      <PageHeading
        title={run ? runName(rows, run) : 'A run that is gone'}
        aside={run?.length ?? undefined}
        detail={
          answer?.kind === 'sizes' ? (
            <>
              Load on its most loaded line {formatAmps(answer.load.amps)}
              {answer.load.continuousAmps > 0 &&
                `, ${formatAmps(answer.load.continuousAmps)} of it continuous`}
              {run?.floorOverride && `. Below the ampacity floor by decision: ${run.floorOverride}`}
            </>
          ) : (
            'Every size of its material, each by solving the whole job again'
          )
        }
        actions={undo !== null && !archived && <Button onClick={takeBack}>Undo: {undo}</Button>}
      />
      {problem && <Message kind="wrong">{problem}</Message>}
      <div className="flex flex-wrap items-end gap-x-6 gap-y-2 border-b border-rule px-4 pb-3">
        <Field label="Run" className="w-full desk:w-96">
          <Select
            value={run?.id ?? ''}
            onValue={(value) =>
              setParams(
                (before) => {
                  const after = new URLSearchParams(before);
                  after.set('run', value);
                  return after;
                },
                { replace: true },
              )
            }
            choices={run ? choices : [{ value: '', label: 'Choose a run' }, ...choices]}
          />
        </Field>
        <Field label="Parallel sets up to">
          <Select value={sets} onValue={setSets} choices={SETS.map((value) => ({ value, label: value }))} />
        </Field>
        <Checkbox checked={both} onChecked={setBoth} label="Copper and aluminum" />
      </div>
      {!run ? (
        <Message kind="wrong">This run is not in the job any more. Choose another one.</Message>
      ) : fault ? (
        <Message kind="wrong">
          The solver stopped: {fault}. Nothing that was typed is lost; reload the page to go on.
        </Message>
      ) : answer === null ? (
        <Skeleton rows={12} label="Solving the job once for every size" />
      ) : answer.kind === 'none' ? (
        <Message kind="note">{answer.reason}</Message>
      ) : (
        <>
          {(solving || answer.run !== run.id) && (
            <p role="status" className="px-4 pt-2 text-label text-ink-soft">
              Solving again for the change…
            </p>
          )}
          <SizesTable
            run={run.id}
            sizes={answer.sizes}
            feeder={run.kind !== 'branch'}
            lengthUnit={jobRow.lengthUnit}
            readOnly={archived || run.locked}
          />
          <SizesChart sizes={answer.sizes} />
          <div className="max-w-200 space-y-1 px-4 py-3 text-label text-ink-soft">
            <p>
              Ampacity is of the size by the rules that are checked here:{' '}
              {answer.sizes[0]?.floor.basis || 'none for this run'}. “Below” means that the load or the
              breaker asks for more; such a size is used only with a reason, which is printed. “Passes to” is
              the longest run of that size within its limits, in “{SCENARIO_WORDS[scenario].label}”.
            </p>
            {run.locked && <p>This run is locked as existing: its size is not changed here.</p>}
          </div>
        </>
      )}
      {run && handCheckFor && (
        <div className="max-w-200">
          <h2 className="sr-only">Checked by hand</h2>
          {handCheckFor(run.id)}
        </div>
      )}
      <div className="border-t border-rule px-4 py-3">{cautions}</div>
    </Scroller>
  );
}
