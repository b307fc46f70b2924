import { inOrder } from '@farlug/contract/job';
import type { JobRows, LimitKind } from '@farlug/contract/rows';
import { systemsOfRows, systemText } from '@farlug/contract/schedule';
import { formatLimit } from '@farlug/solver/units';
import { SYSTEM_WORDS } from '../../lib/job-words.ts';

/** The service as a title block says it. */
export function serviceText(rows: JobRows): { name: string; detail: string } {
  const source = inOrder(rows.source.values())[0];
  if (!source) return { name: 'no service yet', detail: 'add one in the job settings' };
  const system = systemsOfRows(rows).get(source.busId);
  const words = SYSTEM_WORDS[source.system].toLowerCase();
  const behind = source.faultAmps
    ? `${Number(source.faultAmps) / 1000} kA`
    : source.impedanceR !== null
      ? 'impedance stated'
      : 'stiff source';
  return { name: system ? systemText(system) : words, detail: `${words}, ${behind}` };
}

const TITLE_LIMITS: readonly [LimitKind, string][] = [
  ['feeder', 'feeder'],
  ['branch', 'branch'],
  ['total', 'total'],
];

/** The limits for every class, and the ground they stand on. */
export function limitsText(rows: JobRows): { label: string; values: string; ground: string } {
  const job = [...rows.job.values()][0]!;
  const set = TITLE_LIMITS.flatMap(([kind, word]) => {
    const row = [...rows.limit.values()].find((limit) => limit.kind === kind && limit.class === null);
    return row ? [{ word, value: Number(row.value) }] : [];
  });
  const more = rows.limit.size > set.length ? ' and more' : '';
  const force = job.limitForce === 'recommendation' ? 'recommended' : 'mandatory';
  return {
    label: set.length > 0 ? `Limits: ${set.map((one) => one.word).join(', ')}${more}` : 'Limits',
    values: set.length > 0 ? set.map((one) => formatLimit(one.value)).join(', ') : 'none set',
    ground: `${job.limitBasis ?? 'ground not stated'}, ${force}`,
  };
}
