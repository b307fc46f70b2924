import { type CommandOptions, commandOptions } from './command-options.ts';
import { nodalEquations } from './equations/index.ts';
import { CAUTION, type Job, NEUTRAL_CAUTION, parseJob, SCENARIOS } from './job/index.ts';
import { solveJob } from './judge/index.ts';
import type { Refusal } from './network/index.ts';
import { SOLVER_VERSION } from './version.ts';
import { losses, lostNeutral, sensitivities } from './what-if/index.ts';

/** Exit codes: solved; the file is refused; the network cannot be solved; the command itself is wrong. */
export const EXIT = { solved: 0, refused: 1, unsolvable: 2, usage: 64 } as const;

const USAGE = `usage: npm run -s solve -- FILE [option …]

Solves one job file and prints one JSON document. FILE - reads standard input.
  --scenario NAME     one of ${SCENARIOS.join(', ')}; each-circuit unless told
  --equations         adds the node equations, written out and as a matrix
  --sensitivities     adds what the drop at each load changes by when a run gets 1 % longer
  --losses            adds what runs and transformers lose, in watts
  --load-factor N     and in kWh a year at this load factor, 0 to 1
  --loss-factor N     or at this loss factor, in place of the one that follows from the load factor
  --price N           and in money, at this price per kWh
  --lost-neutral RUN  adds what every load would see without the neutral of this run, on paper
  --pretty            indents the document
Exit 0 solved, 1 the file is refused, 2 the network cannot be solved, 64 the command is wrong.
`;

export interface CommandIo {
  /** Text of a file, `-` for standard input; throws where it cannot be read. */
  read: (file: string) => Promise<string>;
  out: (text: string) => void;
  err: (text: string) => void;
}

/** Runs `solve` with its arguments; returns the exit code. */
export async function runCommand(args: readonly string[], io: CommandIo): Promise<number> {
  const options = commandOptions(args);
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
  const more = additions(parsed.job, options);
  if ('kind' in more) {
    io.err(`${more.at}: ${more.reason}\n`);
    return EXIT.unsolvable;
  }
  const document = { ...outcome.solution, warnings: parsed.warnings, ...more.added };
  io.out(`${JSON.stringify(document, null, options.pretty ? 2 : undefined)}\n`);
  const cautions = options.lostNeutral === null ? CAUTION : `${CAUTION} ${NEUTRAL_CAUTION}`;
  io.err(`farlug solver ${SOLVER_VERSION}. ${cautions}\n`);
  return EXIT.solved;
}

/** What stands beside the solution, by its key in the document; or the first that is refused. */
function additions(job: Job, options: CommandOptions): { added: Record<string, unknown> } | Refusal {
  const { scenario } = options;
  const added: Record<string, unknown> = {};
  if (options.equations) added.equations = nodalEquations(job, { scenario });
  if (options.sensitivities) {
    const outcome = sensitivities(job, { scenario });
    if (outcome.kind === 'unsolvable') return outcome;
    added.sensitivities = outcome;
  }
  if (options.losses) {
    const outcome = losses(job, { scenario, ...options.losses });
    if (outcome.kind === 'unsolvable') return outcome;
    added.losses = outcome;
  }
  if (options.lostNeutral !== null) {
    const outcome = lostNeutral(job, { run: options.lostNeutral });
    if (outcome.kind === 'unsolvable') return outcome;
    added.lostNeutral = outcome;
  }
  return { added };
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
