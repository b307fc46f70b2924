import { nodalEquations } from './equations/index.ts';
import { CAUTION, parseJob, SCENARIOS, type Scenario } from './job/index.ts';
import { solveJob } from './judge/index.ts';
import { SOLVER_VERSION } from './version.ts';

/** Exit codes: solved; the file is refused; the network cannot be solved; the command itself is wrong. */
export const EXIT = { solved: 0, refused: 1, unsolvable: 2, usage: 64 } as const;

const USAGE = `usage: npm run -s solve -- FILE [--scenario NAME] [--equations] [--pretty]

Solves one job file and prints one JSON document. FILE - reads standard input.
  --scenario NAME  one of ${SCENARIOS.join(', ')}; each-circuit unless told
  --equations      adds the node equations, written out and as a matrix
  --pretty         indents the document
Exit 0 solved, 1 the file is refused, 2 the network cannot be solved, 64 the command is wrong.
`;

export interface CommandIo {
  /** Text of a file, `-` for standard input; throws where it cannot be read. */
  read: (file: string) => Promise<string>;
  out: (text: string) => void;
  err: (text: string) => void;
}

interface Options {
  file: string;
  scenario: Scenario;
  equations: boolean;
  pretty: boolean;
}

/** Runs `solve` with its arguments; returns the exit code. */
export async function runCommand(args: readonly string[], io: CommandIo): Promise<number> {
  const options = optionsOf(args);
  if (typeof options === 'string') {
    io.err(options === '' ? USAGE : `${options}\n\n${USAGE}`);
    return EXIT.usage;
  }
  const input = await readJson(options.file, io);
  if (!input.ok) {
    io.err(`${input.message}\n`);
    return EXIT.refused;
  }
  const parsed = parseJob(input.value);
  if (!parsed.ok) {
    io.err(parsed.problems.map(({ path, message }) => `${path}: ${message}\n`).join(''));
    return EXIT.refused;
  }
  const outcome = solveJob(parsed.job, { scenario: options.scenario });
  if (outcome.kind !== 'solved') {
    io.err(`${outcome.at}: ${outcome.reason}\n`);
    return EXIT.unsolvable;
  }
  const solution = { ...outcome.solution, warnings: parsed.warnings };
  const document = options.equations
    ? { ...solution, equations: nodalEquations(parsed.job, { scenario: options.scenario }) }
    : solution;
  io.out(`${JSON.stringify(document, null, options.pretty ? 2 : undefined)}\n`);
  io.err(`farlug solver ${SOLVER_VERSION}. ${CAUTION}\n`);
  return EXIT.solved;
}

/** The options, or what is wrong with them; an empty text asks for the usage alone. */
function optionsOf(args: readonly string[]): Options | string {
  const options: Options = { file: '', scenario: 'each-circuit', equations: false, pretty: false };
  for (let i = 0; i < args.length; i++) {
    const arg = args[i]!;
    if (arg === '--help' || arg === '-h') return '';
    if (arg === '--equations') options.equations = true;
    else if (arg === '--pretty') options.pretty = true;
    else if (arg === '--scenario' || arg.startsWith('--scenario=')) {
      const name = arg === '--scenario' ? args[++i] : arg.slice('--scenario='.length);
      const scenario = SCENARIOS.find((one) => one === name);
      if (!scenario) return `--scenario: must be one of ${SCENARIOS.join(', ')}, is ${name ?? 'missing'}`;
      options.scenario = scenario;
    } else if (arg.startsWith('--')) return `${arg}: is not an option`;
    else if (options.file !== '') return `${arg}: one job file at a time`;
    else options.file = arg;
  }
  return options.file === '' ? 'FILE: is missing' : options;
}

async function readJson(
  file: string,
  io: CommandIo,
): Promise<{ ok: true; value: unknown } | { ok: false; message: string }> {
  const name = file === '-' ? 'standard input' : file;
  let text: string;
  try {
    text = await io.read(file);
  } catch (error) {
    return { ok: false, message: `${name}: cannot be read: ${reasonOf(error)}` };
  }
  try {
    return { ok: true, value: JSON.parse(text.replace(/^\uFEFF/, '')) };
  } catch (error) {
    return { ok: false, message: `${name}: must be a JSON document: ${reasonOf(error)}` };
  }
}

const reasonOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));
