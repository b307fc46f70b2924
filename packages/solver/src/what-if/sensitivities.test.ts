import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runs, seeds } from '../../test/support/against-dense.ts';
import { jobFile, ohmLoad, ohmRun } from '../../test/support/job-file.ts';
import { randomFrom } from '../../test/support/random.ts';
import { randomJob, type Wanted } from '../../test/support/random-job.ts';
import {
  type Job,
  type JobFile,
  parseJob,
  SCENARIOS,
  type Scenario,
  type SolveOutcome,
} from '../job/index.ts';
import { solveJob } from '../judge/index.ts';
import { type Sensitivities, sensitivities } from './sensitivities.ts';

const parsed = (file: JobFile): Job => {
  const outcome = parseJob(file);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome.problems));
  return outcome.job;
};
const solved = (job: Job, scenario: Scenario): Sensitivities => {
  const outcome = sensitivities(job, { scenario });
  if (outcome.kind !== 'sensitivities') throw new Error(outcome.reason);
  return outcome;
};

describe('sensitivities of a radial job', () => {
  /** 100 V; 0.1 Ω and back to the panel, 0.3 Ω and 0.2 Ω and back beyond it; 10 A and 4 A. */
  const file = jobFile({
    basis: 'resistance',
    sources: [{ id: 'service', bus: 'head', system: '1ph-2w', volts: 100 }],
    runs: [
      ohmRun('F1', 'head', 'panel', ['L1', 'N'], 0.1, 0, { kind: 'feeder' }),
      ohmRun('C1', 'panel', 'near', ['L1', 'N'], 0.3),
      ohmRun('C2', 'panel', 'far', ['L1', 'N'], 0.2),
      ohmRun('C3', 'far', 'end', ['L1', 'N'], 0.5),
    ],
    loads: [
      { id: 'ten', bus: 'near', terminals: 'L1-N', amps: 10 },
      { id: 'four', bus: 'end', terminals: 'L1-N', amps: 4 },
    ],
  });
  const { loads } = solved(parsed(file), 'design');

  it('are the share of each run in the drop, by hand, largest first, and no run aside', () => {
    // 14 A · 0.2 Ω = 2.8 V of 100 V, 10 A · 0.6 Ω = 6 V, 4 A · 0.4 Ω = 1.6 V, 4 A · 1 Ω = 4 V.
    const shares = (at: number) =>
      loads[at]!.runs.map(({ run, percentPerPercent }) => [run, 100 * percentPerPercent]);
    expect(shares(0)).toEqual([
      ['C1', expect.closeTo(6, 9)],
      ['F1', expect.closeTo(2.8, 9)],
    ]);
    expect(shares(1)).toEqual([
      ['C3', expect.closeTo(4, 9)],
      ['F1', expect.closeTo(2.8, 9)],
      ['C2', expect.closeTo(1.6, 9)],
    ]);
    expect(loads[1]).toMatchObject({ pair: 'L1-N', turn: null });
    expect(loads[1]!.dropPercent).toBeCloseTo(8.4, 9);
  });

  it('are of the worst turn in each-circuit', () => {
    const half = { ...file, loads: file.loads!.map((load) => ({ ...load, demand: 0.5 })) };
    const four = solved(parsed(half), 'each-circuit').loads[1]!;
    // 5 A of the other and its own 4 A: 9 A · 0.2 Ω.
    expect(four.turn).toBe('all');
    expect(four.runs.map(({ run, percentPerPercent }) => [run, 100 * percentPerPercent])).toEqual([
      ['C3', expect.closeTo(4, 9)],
      ['F1', expect.closeTo(1.8, 9)],
      ['C2', expect.closeTo(1.6, 9)],
    ]);
  });

  it('see that a longer way to an impedance load eases the others', () => {
    const eased = {
      ...file,
      loads: [{ id: 'ten', bus: 'near', terminals: 'L1-N' as const, ...ohmLoad(9, 0, 100) }, file.loads![1]!],
    };
    const four = solved(parsed(eased), 'design').loads[1]!;
    expect(four.runs.find(({ run }) => run === 'C1')!.percentPerPercent).toBeLessThan(0);
  });
});

it('of a constant-power load are those of the two-bus closed form', () => {
  // V = (E + √(E² − 4·R·P))/2, so that dV/d ln R = −R·P/√(E² − 4·R·P).
  const [volts, ohms, watts] = [100, 0.8, 2000];
  const job = parsed(
    jobFile({
      frequency: 0,
      sources: [{ id: 'battery', bus: 'head', system: 'dc-2w', volts }],
      runs: [ohmRun('C1', 'head', 'end', ['L1', 'N'], ohms / 2)],
      loads: [{ id: 'drive', bus: 'end', terminals: 'L1-N', watts, behaviour: 'power' }],
    }),
  );
  const [drive] = solved(job, 'design').loads;
  const root = Math.sqrt(volts * volts - 4 * ohms * watts);
  expect(drive!.runs[0]!.percentPerPercent).toBeCloseTo((ohms * watts) / root / volts, 9);
});

/** Step of the logarithm: truncation ~ step², rounding ~ 1e-13/step (settled loads: 1e-10/step at worst). */
const STEP = 1e-4;
const longer = (job: Job, index: number, by: number): Job => ({
  ...job,
  runs: job.runs.map((run, i) => (i === index ? { ...run, length: run.length * Math.exp(by) } : run)),
});

/** Central differences of the solver for a few runs of random jobs. Returns how many numbers were compared. */
const compare = (wanted: Wanted, few: number, tolerance: number): number => {
  let compared = 0;
  fc.assert(
    fc.property(seeds, fc.constantFrom(...SCENARIOS), (seed, scenario) => {
      const job = parsed(randomJob(seed, wanted));
      const outcome = sensitivities(job, { scenario });
      if (outcome.kind !== 'sensitivities') return;
      const random = randomFrom(seed);
      for (let k = 0; k < 4; k++) {
        const index = random.whole(0, job.runs.length - 1);
        const [up, down] = [STEP, -STEP].map((by) =>
          solveJob(longer(job, index, by), { scenario, headroom: false }),
        ) as [SolveOutcome, SolveOutcome];
        if (up.kind !== 'solved' || down.kind !== 'solved') return;
        for (const [i, { runs: list, dropPercent, turn }] of outcome.loads.entries()) {
          if (
            dropPercent === null ||
            up.solution.loads[i]!.turn !== turn ||
            down.solution.loads[i]!.turn !== turn
          )
            continue;
          const slope =
            (up.solution.loads[i]!.dropPercent! - down.solution.loads[i]!.dropPercent!) / (2 * STEP);
          const ours = 100 * (list.find(({ run }) => run === job.runs[index]!.id)?.percentPerPercent ?? 0);
          expect(
            Math.abs(ours - slope),
            `${seed} ${scenario} ${job.loads[i]!.id} ${job.runs[index]!.id}`,
          ).toBeLessThan(tolerance * Math.max(1, Math.abs(slope)));
          compared++;
        }
      }
    }),
    runs(few),
  );
  return compared;
};

describe('sensitivities against central differences of the solver', () => {
  it('with fixed currents and impedances, rings, transformers and diversity', () => {
    expect(compare({ iterated: false }, 12, 1e-6)).toBeGreaterThan(200);
  });

  it('with loads that follow their voltage', () => {
    expect(compare({}, 14, 1e-6)).toBeGreaterThan(150);
  });
});

/** 10 A through 20 m of 12 AWG and back, as warm as that makes it. */
const warm = jobFile({
  basis: 'resistance',
  sources: [{ id: 'service', bus: 'head', system: '1ph-2w', volts: 120 }],
  runs: [
    {
      id: 'C1',
      kind: 'branch',
      from: 'head',
      to: 'end',
      length: 20,
      conductors: ['L1', 'N'],
      size: '12 AWG',
      temperature: 'operating',
    },
  ],
  loads: [{ id: 'lamp', bus: 'end', terminals: 'L1-N', amps: 10 }],
});

it('at operating temperature and fixed amps are the whole drop: the temperature stays', () => {
  const [lamp] = solved(parsed(warm), 'design').loads;
  expect(100 * lamp!.runs[0]!.percentPerPercent).toBeCloseTo(lamp!.dropPercent!, 9);
});

it('of an unserved load are none; and they refuse what the solver refuses', () => {
  const job = parsed({ ...warm, buses: [{ id: 'island' }] });
  expect(sensitivities(job, { scenario: 'design' })).toMatchObject({ at: 'bus island' });
  const open = { ...warm, runs: [{ ...warm.runs![0]!, open: true }] };
  expect(solved(parsed(open), 'each-circuit').loads[0]).toMatchObject({
    dropPercent: null,
    pair: null,
    runs: [],
  });
});
