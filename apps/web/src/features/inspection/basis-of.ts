import type { RevisionInput } from '@farlug/contract/routes';
import type { Limits, Scenario } from '@farlug/solver/job';
import { formatCount, formatLimit } from '../../lib/format.ts';
import { CLASS_WORDS, SCENARIO_WORDS, SYSTEM_WORDS } from '../../lib/job-words.ts';

/** What the report stands on, line by line. */
export function basisOf(input: RevisionInput): [string, string][] {
  const { job } = input;
  const block = input.titleBlock;
  return [
    ['Limits', limitsInWords(job.limits)],
    ['Ground', groundInWords(job.limits)],
    ['Counted', countedInWords(job.limits)],
    ['Scenario', scenarioInWords(input.scenario)],
    ['Service', job.sources.map(sourceInWords).join('; ')],
    ['Conductors', conductorsInWords(input)],
    ['Code', block.codeEdition ?? 'not stated'],
    ['Authority', block.authority ?? 'not stated'],
    ['Permit', block.permitNumber ?? 'not stated'],
    ['Assumed', assumedInWords(input)],
  ];
}

function limitsInWords(limits: Limits): string {
  const parts: string[] = [];
  const add = (word: string, value: number | null) => {
    if (value !== null) parts.push(`${word} ${formatLimit(value)}`);
  };
  add('feeder', limits.feeder);
  add('branch', limits.branch);
  add('together', limits.total);
  add('starting', limits.starting);
  add('rise', limits.rise);
  for (const [name, own] of Object.entries(limits.byClass)) {
    const figures = [own?.feeder, own?.branch, own?.total].filter(
      (value) => value !== null && value !== undefined,
    );
    if (figures.length > 0)
      parts.push(
        `${CLASS_WORDS[name as keyof typeof CLASS_WORDS].toLowerCase()} ${figures.map(formatLimit).join(' and ')}`,
      );
  }
  return parts.length > 0 ? parts.join(', ') : 'none set';
}

function groundInWords(limits: Limits): string {
  const force = limits.force === 'mandatory' ? 'mandatory' : 'a recommendation';
  return `${limits.basis ?? 'not stated'}: ${force}`;
}

function countedInWords(limits: Limits): string {
  const more = [
    limits.includeService && 'service',
    limits.includeTransformer && 'transformer',
    limits.includeSource && 'source',
  ].filter((word) => word !== false);
  return ['feeder', 'branch', ...more].join(', ');
}

function scenarioInWords(name: string): string {
  const words = SCENARIO_WORDS[name as Scenario];
  return words ? `${words.label.toLowerCase()}, ${words.others}` : name;
}

function sourceInWords(source: RevisionInput['job']['sources'][number]): string {
  const behind = source.fault
    ? `, ${(source.fault.amps / 1000).toLocaleString('en')} kA, X/R ${source.fault.xOverR}`
    : source.impedance
      ? `, ${source.impedance.r} + j${source.impedance.x} ohm`
      : '';
  return `${SYSTEM_WORDS[source.system].toLowerCase()}, ${source.volts} V${behind}`;
}

function conductorsInWords({ job, wireUnit }: RevisionInput): string {
  const basis = job.basis === 'impedance' ? 'impedance' : 'resistance only';
  return wireUnit === 'awg'
    ? `AWG and kcmil, 75 °C unless stated, ${basis}`
    : `mm², 70 °C unless stated, ${basis}`;
}

function assumedInWords({ assumed }: RevisionInput): string {
  if (assumed.length === 0) return 'nothing';
  const counts = new Map<string, number>();
  for (const { field } of assumed) counts.set(field, (counts.get(field) ?? 0) + 1);
  const word: Record<string, [string, string]> = {
    length: ['length', 'lengths'],
    powerFactor: ['power factor', 'power factors'],
    size: ['load', 'loads'],
    raceway: ['raceway', 'raceways'],
  };
  return [...counts]
    .map(([field, count]) => {
      const [one, many] = word[field] ?? [field, field];
      return formatCount(count, one, many);
    })
    .join(', ');
}
