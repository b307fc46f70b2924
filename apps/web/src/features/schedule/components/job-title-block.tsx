import type { JobRows } from '@farlug/contract/rows';
import type { Scenario } from '@farlug/solver/job';
import type { ReactNode } from 'react';
import { useOpenJob } from '../../../job/open-job.tsx';
import { useResult, useScenario } from '../../../job/use-result.ts';
import { formatPercent } from '../../../lib/format.ts';
import { BASIS_WORDS, SCENARIO_WORDS } from '../../../lib/job-words.ts';
import { Select } from '../../../ui/select.tsx';
import { TitleBlock, TitleCell } from '../../../ui/title-block.tsx';
import { Tally, VerdictFigure } from '../../../ui/verdict.tsx';
import { limitsText, serviceText } from '../job-texts.ts';

const SCENARIO_CHOICES = (Object.keys(SCENARIO_WORDS) as Scenario[]).map((value) => ({
  value,
  label: SCENARIO_WORDS[value].label,
}));

/** Job, service, basis, limits, scenario, worst load, counts: what every result of the page stands on. */
export function JobTitleBlock({
  rows,
  worstName,
  action,
}: {
  rows: JobRows;
  worstName: string | null;
  action?: ReactNode;
}) {
  const { archived } = useOpenJob();
  const { result, solving } = useResult();
  const [scenario, setScenario] = useScenario();
  const job = [...rows.job.values()][0]!;
  const service = serviceText(rows);
  const limits = limitsText(rows);
  const judged = result
    ? [...result.circuits.values()].filter((circuit) => circuit.shown !== 'unjudged').length
    : 0;
  return (
    <TitleBlock action={action}>
      <TitleCell label="Job" strong sub={archived ? 'archived: read only' : (job.address ?? 'no address')}>
        {job.name}
      </TitleCell>
      <TitleCell label="Service" sub={service.detail} shrink>
        {service.name}
      </TitleCell>
      <TitleCell label="Basis" sub={job.frequency === '0' ? 'direct current' : `${job.frequency} Hz`}>
        {BASIS_WORDS[job.basis]}
      </TitleCell>
      <TitleCell label={limits.label} sub={limits.ground} shrink>
        {limits.values}
      </TitleCell>
      <TitleCell label="Scenario" sub={SCENARIO_WORDS[scenario].others} phone>
        <Select
          bare
          aria-label="Scenario"
          value={scenario}
          onValue={setScenario}
          choices={SCENARIO_CHOICES}
        />
      </TitleCell>
      <TitleCell label="Worst load" sub={worstName ?? ''} phone shrink>
        {result?.worst ? (
          <VerdictFigure kind={result.worst.shown}>
            {formatPercent(result.worst.worst.totalPercent)}
          </VerdictFigure>
        ) : (
          <span className="text-ink-soft">{result?.state === 'stopped' ? 'not computed' : ''}</span>
        )}
      </TitleCell>
      <TitleCell
        phone
        label={
          <span role="status">
            {solving && !result ? 'solving…' : `${judged} judged, ${result?.leftOutCount ?? 0} left out`}
          </span>
        }
      >
        <Tally
          counts={{
            ...result?.counts,
            unjudged: (result?.counts.unjudged ?? 0) + (result?.leftOutCount ?? 0),
          }}
          words={{ unjudged: result?.counts.unjudged ? 'left out or not judged' : 'left out' }}
        />
      </TitleCell>
    </TitleBlock>
  );
}
