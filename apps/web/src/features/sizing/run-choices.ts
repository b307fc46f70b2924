import { inOrder } from '@farlug/contract/job';
import type { JobRows, Row } from '@farlug/contract/rows';
import type { Choice } from '../../ui/select.tsx';
import type { JobResult, RunFigures } from '../../workers/results.ts';

const GROUPS = { over: 'Falls short', near: 'Near a limit', other: 'Other runs' } as const;
const RANK = Object.values(GROUPS) as string[];

/** `LP-2-20, roof deck`: a run by its circuit, or `F8 to LP-2`. */
export function runName(rows: JobRows, run: Row<'run'>): string {
  const circuit = run.circuitId === null ? null : rows.circuit.get(run.circuitId);
  const serves = circuit?.kind === 'branch' ? circuit.description : rows.bus.get(run.toBusId)?.code;
  const name = circuit?.kind === 'branch' ? run.code : `${run.code} to ${serves ?? 'nothing'}`;
  return circuit?.kind === 'branch' && serves ? `${name}, ${serves}` : name;
}

/** Every run that carries something, those that fall short first. */
export function runChoices(rows: JobRows, result: JobResult | null): Choice[] {
  const groupOf = (figures: RunFigures | undefined): string => {
    if (figures?.shown === 'over' || figures?.shown === 'rise') return GROUPS.over;
    return figures?.shown === 'near' ? GROUPS.near : GROUPS.other;
  };
  const size = (figures: RunFigures | undefined) => Math.abs(figures?.dropPercent ?? 0);
  return inOrder(rows.run.values())
    .map((run) => ({ run, figures: result?.runs.get(run.id) }))
    .sort((a, b) => {
      const [x, y] = [RANK.indexOf(groupOf(a.figures)), RANK.indexOf(groupOf(b.figures))];
      return x - y || (x < 2 ? size(b.figures) - size(a.figures) : 0);
    })
    .map(({ run, figures }) => ({ value: run.id, label: runName(rows, run), group: groupOf(figures) }));
}
