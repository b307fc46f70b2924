import type { Job, Load, Run, Scenario, Source, System, Transformer } from '@farlug/solver/job';
import type { ShownVerdict } from '@farlug/solver/judge';
import { MOTOR_POWER_FACTOR } from '@farlug/solver/tables';
import { formatNumber, formatSize } from '@farlug/solver/units';

export const VERDICT_WORDS: Record<ShownVerdict, string> = {
  over: 'over',
  rise: 'rise',
  near: 'near',
  within: 'within',
  unserved: 'not served',
  unjudged: 'not judged',
};

export const SCENARIO_TEXT: Record<Scenario, string> = {
  'each-circuit': 'each circuit full in turn, all others at design demand',
  design: 'every load at its design demand',
  'everything-on': 'every load full at once, no diversity',
  light: 'light load: generation full, loads at their least',
  starting: 'each motor starting in turn, all others at design demand',
};

const SYSTEM_TEXT: Record<System, string> = {
  'dc-2w': 'direct current, 2-wire',
  '1ph-2w': '1-phase 2-wire',
  '1ph-3w': '1-phase 3-wire',
  '1ph-3w-wye': '2 lines and neutral of a wye',
  '3ph-3w': '3-phase 3-wire',
  '3ph-4w': '3-phase 4-wire',
  '3ph-4w-delta': '3-phase 4-wire delta with mid-point',
};
const METAL = { copper: 'Cu', aluminum: 'Al' } as const;
const LAID = { pvc: 'PVC', steel: 'steel', aluminum: 'Al conduit', cable: 'cable' } as const;

/** `10 Cu steel`, `2 × 3/0 Cu PVC`, `stated ohms`. */
export function runWords(run: Run): string {
  if (run.ohms || run.size === null) return 'stated ohms';
  const size = formatSize(run.size).replace(/ AWG$/, '');
  return `${run.sets > 1 ? `${run.sets} × ` : ''}${size} ${METAL[run.material]} ${LAID[run.raceway]}`;
}

/** The load as it was entered, with its unit. */
export function loadText(load: Load): string {
  const many = load.quantity === 1 ? '' : `${formatNumber(load.quantity)} × `;
  if (load.amps !== null) return `${many}${formatNumber(load.amps, 2)} A`;
  if (load.va !== null) return `${many}${formatNumber(load.va, 0)} VA`;
  if (load.watts !== null) return `${many}${formatNumber(load.watts, 0)} W`;
  if (load.kw !== null) return `${many}${formatNumber(load.kw, 3)} kW`;
  return `${many}${formatNumber(load.hp ?? 0, 2)} hp`;
}

/** The power factor that the loads of a circuit have in common. */
export function powerFactorText(loads: readonly Load[]): string {
  const factors = new Set(
    loads.map(
      (load) =>
        `${formatNumber(load.powerFactor ?? (load.hp === null ? 1 : MOTOR_POWER_FACTOR), 2)}${load.leading ? ' lead' : ''}`,
    ),
  );
  return factors.size === 1 ? [...factors].join('') : '';
}

export function sourceText(source: Source): string {
  const behind = source.fault
    ? `${formatNumber(source.fault.amps / 1000, 2)} kA, X/R\u00a0${formatNumber(source.fault.xOverR, 2)}`
    : source.impedance
      ? `${formatNumber(source.impedance.r, 5)} + j${formatNumber(source.impedance.x, 5)} Ω per line`
      : 'stiff, no impedance stated';
  return `${source.id}: ${formatNumber(source.volts, 1)} V, ${SYSTEM_TEXT[source.system]}, ${behind}${source.off ? ', off' : ''}`;
}

export const transformerText = (t: Transformer): string =>
  `${t.id}: ${formatNumber(t.kva, 1)} kVA, ${formatNumber(t.primaryVolts)} to ${formatNumber(t.secondaryVolts)} V, ${t.connection.replace('-', '–')}, ${formatNumber(t.percentZ, 2)} %Z, X/R\u00a0${formatNumber(t.xOverR, 2)}${t.tapPercent === 0 ? '' : `, tap ${formatNumber(t.tapPercent, 2)} %`}`;

/** The limits as they were set, in one sentence. */
export function limitsText({ limits }: Job): string {
  const each = (percents: { feeder: number | null; branch: number | null; total: number | null }) =>
    [
      percents.feeder === null ? null : `feeder ${formatNumber(percents.feeder, 2)} %`,
      percents.branch === null ? null : `branch ${formatNumber(percents.branch, 2)} %`,
      percents.total === null ? null : `total ${formatNumber(percents.total, 2)} %`,
    ]
      .filter(Boolean)
      .join(', ');
  const volts = (word: string, limit: typeof limits.lowestVolts) =>
    limit === null
      ? null
      : typeof limit === 'number'
        ? `${word} ${formatNumber(limit, 1)}\u00a0V`
        : `${word} ${Object.entries(limit)
            .map(([at, value]) => `${formatNumber(value ?? 0, 1)} V at ${at} V`)
            .join(', ')}`;
  const parts = [
    each(limits),
    ...Object.entries(limits.byClass).map(([name, own]) =>
      own
        ? `${name}: ${each({ feeder: own.feeder ?? null, branch: own.branch ?? null, total: own.total ?? null })}`
        : '',
    ),
    limits.starting === null ? '' : `starting ${formatNumber(limits.starting, 2)} %`,
    limits.rise === null ? '' : `rise ${formatNumber(limits.rise, 2)} %`,
    volts('lowest', limits.lowestVolts) ?? '',
    volts('highest', limits.highestVolts) ?? '',
    limits.rating ? `rating ${limits.rating.low ?? ''} to ${limits.rating.high ?? ''} %` : '',
    limits.longRun ? 'long runs add 0.005 % per metre beyond 100 m, at most 0.5 %' : '',
  ].filter((part) => part !== '');
  return parts.length === 0 ? 'none set' : parts.join('; ');
}

/** What the total leaves out. */
export function notCounted({ limits }: Job): string {
  const left = [
    limits.includeSource ? null : 'source',
    limits.includeService ? null : 'service',
    limits.includeTransformer ? null : 'transformers',
  ].filter(Boolean);
  return left.length === 0 ? 'nothing: source, service and transformers count' : left.join(', ');
}

export const day = (instant: string): string => {
  const date = new Date(instant);
  const month = date.toLocaleString('en-GB', { month: 'short', timeZone: 'UTC' });
  return `${date.getUTCDate()} ${month} ${date.getUTCFullYear()}`;
};
