import type { JobFile, Solution } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmRun, type RunFile } from './support/job-file.ts';
import { solveProduct } from './support/solvers.ts';

/**
 * A thousand equal taps on one circuit, r ohms per segment of a line, n of its neutral, I amperes each. A tap at k
 * drops I·r·min(j, k) up to tap j. Sums of a thousand terms round by some 1000·10⁻¹⁶.
 */
const R = 2e-4;
const N = 5e-4;
const I = 0.1;
const CLOSE = 1e-12;

const taps = (
  count: number,
  source: JobFile['sources'][number],
  conductors: RunFile['conductors'],
  lines: LoadFile['terminals'][],
): JobFile =>
  jobFile({
    sources: [source],
    limits: { branch: 3, total: 5 },
    runs: Array.from({ length: count }, (_, k) =>
      ohmRun(`r${k + 1}`, `b${k}`, `b${k + 1}`, conductors, R, 0, { neutral: { r: N } }),
    ),
    loads: Array.from({ length: count }, (_, k) => ({
      id: `l${k + 1}`,
      bus: `b${k + 1}`,
      terminals: lines[k % lines.length]!,
      amps: I,
      powerFactor: 1,
    })),
  });

const phasor = (solution: Solution, bus: number, conductor: 'L1' | 'L2' | 'L3' | 'N'): [number, number] => {
  const [re, im] = solution.buses.find(({ id }) => id === `b${bus}`)!.phasors![conductor]!;
  return [re, im];
};
const close = (found: readonly number[], right: readonly number[], scale: number) => {
  for (const [k, value] of right.entries())
    expect(Math.abs(found[k]! - value), `${found} against ${right}`).toBeLessThan(CLOSE * scale);
};

describe('a thousand taps on one circuit', () => {
  it('one line: V of tap k falls by I·(r + n)·(k·m − k(k − 1)/2) for m taps', () => {
    const m = 1000;
    const job = taps(m, { id: 's', bus: 'b0', system: '1ph-2w', volts: 240 }, ['L1', 'N'], ['L1-N']);
    const solution = solveProduct(job, 'each-circuit');
    for (const k of [1, 2, 500, 999, 1000]) {
      const drop = I * (R + N) * (k * m - (k * (k - 1)) / 2);
      close([solution.loads[k - 1]!.dropVolts!], [drop], drop);
      expect(solution.loads[k - 1]!.turn).toBe('all');
    }
    // 35.035 V of 240 V at the end: 14.6 % > 3 %.
    expect(solution.loads[m - 1]!.verdict).toBe('over');
    expect(solution.runs.map((run) => run.verdict)).toEqual(Array(m).fill('over'));
  });

  it('two legs of a mid-point system in turns: each line by its own taps, the neutral by what is left over', () => {
    // m taps a leg. L1 has taps 1, 3, …: Σ = m². L2 has 2, 4, …: Σ = m(m + 1). From tap k on, the legs cancel where k is
    // odd and leave one ampere-tap of L2 where it is even: N stands at −m·I·n at the end.
    const m = 500;
    const job = taps(
      2 * m,
      { id: 's', bus: 'b0', system: '1ph-3w', volts: 240 },
      ['L1', 'L2', 'N'],
      ['L1-N', 'L2-N'],
    );
    const solution = solveProduct(job, 'design');
    close(phasor(solution, 2 * m, 'L1'), [120 - I * R * m * m, 0], 120);
    close(phasor(solution, 2 * m, 'L2'), [-120 + I * R * m * (m + 1), 0], 120);
    close(phasor(solution, 2 * m, 'N'), [-m * I * N, 0], 120);
    close(
      solution.runs.slice(0, 2).map((run) => run.amps!.N!),
      [0, I],
      1,
    );
    // One leg alone: the neutral carries all that the line does. Of tap j = 2a − 1 on L1: Σ min(2i − 1, j) over i ≤ m is
    // a² + (m − a)·j, through r + n.
    const full = solveProduct(job, 'each-circuit');
    for (const a of [1, 250, 500]) {
      const j = 2 * a - 1;
      const drop = I * (R + N) * (a * a + (m - a) * j);
      const load = full.loads[j - 1]!;
      expect(load.turn).toBe('L1');
      close([load.dropVolts!], [drop], 120);
    }
  });

  it('three lines of a wye in turns: three taps cancel in the neutral', () => {
    // m taps a line; a line's taps at p, p + 3, … add up to m·p + 3·m(m − 1)/2. From tap k on there is nothing left
    // over at k = 1, 4, …, L2 and L3 (−1∠0) at 2, 5, …, L3 (1∠120°) at 3, 6, ….
    const m = 333;
    const volts = 120 * Math.sqrt(3);
    const job = taps(
      3 * m,
      { id: 's', bus: 'b0', system: '3ph-4w', volts },
      ['L1', 'L2', 'L3', 'N'],
      ['L1-N', 'L2-N', 'L3-N'],
    );
    const solution = solveProduct(job, 'design');
    for (const [p, degrees] of [
      [1, 0],
      [2, -120],
      [3, 120],
    ] as const) {
      const size = 120 - I * R * (m * p + (3 * m * (m - 1)) / 2);
      const angle = (degrees * Math.PI) / 180;
      close(phasor(solution, 3 * m, `L${p}`), [size * Math.cos(angle), size * Math.sin(angle)], 120);
    }
    close(phasor(solution, 3 * m, 'N'), [m * I * N * (-1 - 0.5), m * I * N * (Math.sqrt(3) / 2)], 120);
  });

  it('a thousand loads at one bus are as one', () => {
    const source = { id: 's', bus: 'b0', system: '1ph-2w', volts: 240 } as const;
    const job = taps(1, source, ['L1', 'N'], ['L1-N']);
    const many = {
      ...job,
      loads: Array.from({ length: 1000 }, (_, k) => ({ ...job.loads![0]!, id: `l${k}` })),
    };
    const one = { ...job, loads: [{ ...job.loads![0]!, amps: 1000 * I }] };
    const drop = 1000 * I * (R + N);
    close(
      solveProduct(many, 'each-circuit').loads.map((l) => l.dropVolts!),
      Array(1000).fill(drop),
      drop,
    );
    close([solveProduct(one, 'each-circuit').loads[0]!.dropVolts!], [drop], drop);
  });
});
