import { SCENARIOS, type Scenario } from './job/index.ts';
import { type YearOptions, yearOf } from './what-if/loss-factor.ts';

export interface CommandOptions {
  file: string;
  scenario: Scenario;
  equations: boolean;
  sensitivities: boolean;
  /** Id of the run whose neutral is opened on paper. */
  lostNeutral: string | null;
  /** `null` where no losses are asked for. */
  losses: YearOptions | null;
  pretty: boolean;
}

/** Options that take a value, as `--name VALUE` or `--name=VALUE`; each returns what is wrong with it. */
const VALUED: Record<string, (options: CommandOptions, value: string) => string | null> = {
  '--scenario': (options, value) => {
    const scenario = SCENARIOS.find((one) => one === value);
    if (!scenario) return `must be one of ${SCENARIOS.join(', ')}, is ${value}`;
    options.scenario = scenario;
    return null;
  },
  '--lost-neutral': (options, value) => {
    options.lostNeutral = value;
    return null;
  },
  '--load-factor': (options, value) => withYear(options, { loadFactor: numberOf(value) }),
  '--loss-factor': (options, value) => withYear(options, { lossFactor: numberOf(value) }),
  '--price': (options, value) => withYear(options, { pricePerKwh: value }),
};
const WANTED: Record<string, string> = {
  '--scenario': `one of ${SCENARIOS.join(', ')}`,
  '--lost-neutral': 'the id of a run',
  '--load-factor': 'a number such as 0.5',
  '--loss-factor': 'a number such as 0.3',
  '--price': 'a number such as 0.12',
};
const FLAGS: Record<string, (options: CommandOptions) => unknown> = {
  '--equations': (options) => (options.equations = true),
  '--sensitivities': (options) => (options.sensitivities = true),
  '--losses': (options) => withYear(options, {}),
  '--pretty': (options) => (options.pretty = true),
};
const NAMES: Record<string, string> = {
  loadFactor: '--load-factor',
  lossFactor: '--loss-factor',
  pricePerKwh: '--price',
};

const numberOf = (text: string): number => (text.trim() === '' ? Number.NaN : Number(text));
const withYear = (options: CommandOptions, more: YearOptions): null => {
  options.losses = { ...options.losses, ...more };
  return null;
};

/** The options, or what is wrong with them; an empty text asks for the usage alone. */
export function commandOptions(args: readonly string[]): CommandOptions | string {
  const options: CommandOptions = {
    file: '',
    scenario: 'each-circuit',
    equations: false,
    sensitivities: false,
    lostNeutral: null,
    losses: null,
    pretty: false,
  };
  for (let i = 0; i < args.length; i++) {
    const arg = args[i]!;
    if (arg === '--help' || arg === '-h') return '';
    const [name, joined] = parted(arg);
    const take = Object.hasOwn(VALUED, name) ? VALUED[name] : undefined;
    if (take) {
      const value = joined ?? args[++i];
      const problem = value === undefined ? `must be ${WANTED[name]}, is missing` : take(options, value);
      if (problem) return `${name}: ${problem}`;
    } else if (Object.hasOwn(FLAGS, arg)) FLAGS[arg]!(options);
    else if (arg.startsWith('--')) return `${arg}: is not an option`;
    else if (options.file !== '') return `${arg}: one job file at a time`;
    else options.file = arg;
  }
  if (options.file === '') return 'FILE: is missing';
  const year = yearOf(options.losses ?? {});
  return year.ok
    ? options
    : year.problems.map(({ path, message }) => `${NAMES[path]}: ${message}`).join('\n');
}

const parted = (arg: string): [string, string | null] => {
  const at = arg.startsWith('--') ? arg.indexOf('=') : -1;
  return at < 0 ? [arg, null] : [arg.slice(0, at), arg.slice(at + 1)];
};
