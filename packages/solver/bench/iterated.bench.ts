// Loads that hold their power, and the first call of a fresh process, each beside our own linear, warm solve.
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { type Job, parseJob } from '../src/job/index.ts';
import { buildCore, type Core } from '../src/judge/core.ts';
import { designDemand } from '../src/judge/demand.ts';
import { solveJob } from '../src/judge/index.ts';
import { solveDemand } from '../src/judge/operating.ts';
import { bigJob } from './big-job.ts';
import { line, measure, timingOf } from './measure.ts';

const out = (text: string) => void process.stdout.write(text);
const parsed = (file: unknown): Job => {
  const result = parseJob(file);
  if (!result.ok) throw new Error(result.problems[0]!.message);
  return result.job;
};
const coreOf = (job: Job): Core => {
  const core = buildCore(job);
  if ('kind' in core) throw new Error(core.reason);
  return core;
};

if (process.argv[2] === 'first') {
  const job = parsed(bigJob(Number(process.argv[3])));
  const began = performance.now();
  solveJob(job, { scenario: 'each-circuit' });
  out(String(performance.now() - began));
} else {
  out(`${'work'.padEnd(58)}${'median'.padStart(9)}     10 % … 90 %\n`);
  for (const circuits of [160, 1_000, 10_000]) constantPower(circuits);
  for (const circuits of [160, 250, 1_000]) firstCall(circuits);
}

/** Design demand alone: stamp, factor and solve, with every load as a current and with every load as a power. */
function constantPower(circuits: number): void {
  const linear = parsed(bigJob(circuits));
  const loads = linear.loads.map((load) => ({ ...load, behaviour: 'power' as const }));
  const timed = (job: Job) => {
    const core = coreOf(job);
    let rounds = 0;
    const taken = measure(
      () => designDemand(core),
      (demand) => {
        const state = solveDemand(core, demand, null);
        if ('kind' in state) throw new Error(state.reason);
        rounds = state.iterations;
      },
      31,
    );
    return { ...taken, rounds, unknowns: core.layout.nodeOf.length };
  };
  const fixed = timed(linear);
  const power = timed({ ...linear, loads });
  out(
    line(
      `${circuits.toLocaleString('en-US')} circuits, design, currents (${fixed.unknowns} unknowns)`,
      fixed,
    ),
  );
  out(
    line(
      '    constant power',
      power,
      `${(power.median / fixed.median).toFixed(1)} ×, ${power.rounds} rounds`,
    ),
  );
}

function firstCall(circuits: number): void {
  const job = parsed(bigJob(circuits));
  const warm = measure(
    () => ({ ...job }),
    (copy) => solveJob(copy, { scenario: 'each-circuit' }),
    15,
  );
  const self = fileURLToPath(import.meta.url);
  const args = ['--import', 'tsx', self, 'first', String(circuits)];
  const first = timingOf(
    Array.from({ length: 5 }, () => Number(spawnSync(process.execPath, args, { encoding: 'utf8' }).stdout)),
  );
  const { nodes } = coreOf(job).network;
  out(line(`${circuits.toLocaleString('en-US')} circuits, ${nodes.count} nodes: each circuit, warm`, warm));
  out(line('    the first call of a fresh process', first, `${(first.median / warm.median).toFixed(1)} ×`));
}
