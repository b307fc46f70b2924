import { type JobFile, parseJob } from '@farlug/solver/job';
import { prepareJob } from '@farlug/solver/judge';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmRun } from './support/job-file.ts';
import { solveProduct } from './support/solvers.ts';

/**
 * Constant power at the edge of what can be carried. Behind R + jX from E, the far voltage is the larger root of
 *   V⁴ + (2(PR + QX) − E²)·V² + |Z|²·S² = 0,
 * which meets the smaller one at S = E²/(2(|Z| + R cos φ + X sin φ)) (any text on load flow; on direct current
 * V = E/2 + √(E²/4 − P·R) and P = E²/4R). At 1 − ε of that the root moves by 1/√ε for a unit of the equation, so that
 * rounding of some 10⁻¹⁵ shows as 10⁻¹⁵/√ε.
 */
const E = 240;
const R = 0.4;

const reach = (cos: number, sin: number, x: number): number =>
  (E * E) / (2 * (Math.hypot(R, x) + R * cos + x * sin));

/** At 1 − ε of the largest power: 1 − ε enters exactly, so that the discriminant keeps its digits. */
const farVolts = (ε: number, cos: number, sin: number, x: number): number => {
  const z = Math.hypot(R, x);
  const along = R * cos + x * sin;
  const s = reach(cos, sin, x) * (1 - ε);
  // b² − 4c = (E² − 2s(along + z))·(E² − 2s(along − z)), and the first factor is ε·E².
  const root = Math.sqrt(ε * E * E * (E * E - 2 * s * (along - z)));
  return Math.sqrt((E * E - 2 * s * along + root) / 2);
};

const twoBuses = (va: number, powerFactor: number, leading: boolean, x: number, direct = false): JobFile =>
  jobFile({
    frequency: direct ? 0 : 60,
    sources: [{ id: 's', bus: 'a', system: direct ? 'dc-2w' : '1ph-2w', volts: E }],
    runs: [ohmRun('r', 'a', 'b', ['L1', 'N'], R / 2, x / 2)],
    loads: [
      {
        id: 'l',
        bus: 'b',
        terminals: 'L1-N',
        behaviour: 'power',
        va,
        ...(direct ? {} : { powerFactor, leading }),
      },
    ],
  });

const cases = [
  { name: 'direct current', cos: 1, leading: false, x: 0, direct: true },
  { name: 'resistance at power factor 1', cos: 1, leading: false, x: 0, direct: false },
  { name: 'impedance at 1', cos: 1, leading: false, x: 0.3, direct: false },
  { name: 'impedance at 0.8 lagging', cos: 0.8, leading: false, x: 0.3, direct: false },
  { name: 'impedance at 0.9 leading', cos: 0.9, leading: true, x: 0.3, direct: false },
  { name: 'mostly reactance at 0.5 lagging', cos: 0.5, leading: false, x: 4, direct: false },
];
const sineOf = (cos: number, leading: boolean) => Math.sqrt(1 - cos * cos) * (leading ? -1 : 1);

describe.each(cases)('the largest power, $name', ({ cos, leading, x, direct }) => {
  const sin = sineOf(cos, leading);
  const largest = reach(cos, sin, x);

  it.each([0.5, 0.1, 1e-2, 1e-3, 1e-4, 1e-6, 1e-8])('less %d of it is solved to the closed form', (ε) => {
    const { loads, totals } = solveProduct(twoBuses(largest * (1 - ε), cos, leading, x, direct), 'design');
    expect(Math.abs(loads[0]!.volts! / farVolts(ε, cos, sin, x) - 1)).toBeLessThan(2e-14 / Math.sqrt(ε));
    // Where plain rounds would need some 23/(2√ε), these are counted in dozens.
    expect(totals.iterations).toBeLessThan(100);
    expect(Math.abs(totals.sourceWatts - totals.loadWatts - totals.lossWatts)).toBeLessThan(1e-9 * largest);
  });

  it.each([1e-8, 1e-6, 1e-3, 0.2, 1, 30])('and %d of it more is refused, with the load and why', (beyond) => {
    const act = () => solveProduct(twoBuses(largest * (1 + beyond), cos, leading, x, direct), 'design');
    expect(act).toThrow(
      /load l.*no solution at bus b: even alone it asks for (just over|[\d.]+ times) the largest/,
    );
  });
});

describe('three phases, balanced, collapse like one', () => {
  // A phase of E/√3 behind r + jx: three times E²/3/(2(|z| + r cos φ + x sin φ)) in all.
  const [r, x, cos] = [0.2, 0.15, 0.9];
  const sin = Math.sqrt(1 - cos * cos);
  const largest = (E * E) / (2 * (Math.hypot(r, x) + r * cos + x * sin));
  const three = (va: number): JobFile =>
    jobFile({
      sources: [{ id: 's', bus: 'a', system: '3ph-4w', volts: E }],
      runs: [ohmRun('r', 'a', 'b', ['L1', 'L2', 'L3', 'N'], r, x)],
      loads: [{ id: 'm', bus: 'b', terminals: 'three-phase', behaviour: 'power', va, powerFactor: cos }],
    });

  it.each([0.3, 1e-2, 1e-6])('less %d of the largest power is solved', (ε) => {
    const solution = solveProduct(three(largest * (1 - ε)), 'design');
    const along = r * cos + x * sin;
    const s = largest * (1 - ε);
    const root = Math.sqrt(ε * E * E * (E * E - 2 * s * (along - Math.hypot(r, x))));
    const right = Math.sqrt((E * E - 2 * s * along + root) / 2);
    expect(Math.abs(solution.loads[0]!.volts! / right - 1)).toBeLessThan(2e-14 / Math.sqrt(ε));
  });

  it.each([1e-6, 0.5])('%d more is refused by the load alone', (beyond) => {
    expect(() => solveProduct(three(largest * (1 + beyond)), 'design')).toThrow(
      /load m.*even alone it asks for/,
    );
  });
});

describe('several loads near a collapse', () => {
  /**
   * A radial circuit is exact backwards: from the volts at its end follow the currents of its loads, the volts before
   * each run, and at last those of the source. The further down the end, the less the source needs, up to the fold;
   * below it the same source has a solution higher up.
   */
  const powers = [900, 2500, 400, 1800, 3100, 700];
  const line = 0.03;
  const sourceVolts = (end: number): { source: number; volts: number[] } => {
    let v = end;
    let amps = 0;
    const volts: number[] = [];
    for (const watts of [...powers].reverse()) {
      volts.unshift(v);
      amps += watts / v;
      v += 2 * line * amps;
    }
    return { source: v, volts };
  };
  /** The end volts at the fold, where the source volts are least: by thirds. */
  const fold = (() => {
    let [low, high] = [1, 1000];
    for (let k = 0; k < 200; k++) {
      const [a, b] = [low + (high - low) / 3, high - (high - low) / 3];
      if (sourceVolts(a).source < sourceVolts(b).source) high = b;
      else low = a;
    }
    return (low + high) / 2;
  })();
  const chain = (volts: number): JobFile =>
    jobFile({
      frequency: 0,
      sources: [{ id: 's', bus: 'b0', system: 'dc-2w', volts }],
      runs: powers.map((_, k) => ohmRun(`r${k}`, `b${k}`, `b${k + 1}`, ['L1', 'N'], line)),
      loads: powers.map((watts, k) => ({
        id: `l${k}`,
        bus: `b${k + 1}`,
        terminals: 'L1-N',
        behaviour: 'power',
        watts,
      })),
    });

  it.each([3, 1.5, 1.1, 1.01, 1.001, 1.0001])('ends at %d times the volts of the fold', (times) => {
    const { source, volts } = sourceVolts(times * fold);
    const solution = solveProduct(chain(source), 'design');
    // Near the fold source volts hang on end volts by the square: rounding of 10⁻¹⁶ shows as 10⁻¹⁶ over the distance.
    for (const [k, right] of volts.entries())
      expect(Math.abs(solution.loads[k]!.volts! / right - 1), `load ${k}`).toBeLessThan(
        1e-13 + 1e-14 / (times - 1),
      );
  });

  it('is refused below the volts of the fold, by what they come to together', () => {
    const { source } = sourceVolts(fold);
    expect(() => solveProduct(chain(source * (1 + 1e-6)), 'design')).not.toThrow();
    expect(() => solveProduct(chain(source * (1 - 1e-6)), 'design')).toThrow(
      /load l4.*no solution at bus b5: with all that draws beside it, the voltages come no closer/,
    );
  });

  it('names the load that asks too much, not the small one at the end', () => {
    const job = chain(sourceVolts(1.5 * fold).source);
    job.loads![2] = { ...job.loads![2]!, watts: 60_000 };
    expect(() => solveProduct(job, 'design')).toThrow(/load l2.*even alone/);
  });

  it('says which circuit or start it is, and serves the scenarios that stand before it', () => {
    const load: LoadFile = { id: 'l', bus: 'b', terminals: 'L1-N', behaviour: 'power', watts: 40_000 };
    const job: JobFile = { ...twoBuses(1, 1, false, 0), loads: [{ ...load, powerFactor: 1, demand: 0.5 }] };
    expect(() => solveProduct(job, 'each-circuit')).toThrow(/load l.*with the circuit of load l full/);
  });
});

describe('currents at the angle of their own volts', () => {
  // E = w·(|V| + I·z·e^{−jφ}) with w the direction of V: |V| = √(E² − (I·X′)²) − I·R′, R′ + jX′ = z·e^{−jφ}. A round turns a
  // small error of angle into −I·R′/|V| of it: above a drop of a half plain rounds swing ever wider.
  const [r, x, cos] = [0.4, 0.1, 0.9];
  const sin = Math.sqrt(1 - cos * cos);
  const [along, aside] = [r * cos + x * sin, x * cos - r * sin];
  const job = (amps: number): JobFile =>
    jobFile({
      angle: 'local',
      sources: [{ id: 's', bus: 'a', system: '1ph-2w', volts: E }],
      runs: [ohmRun('r', 'a', 'b', ['L1', 'N'], r / 2, x / 2)],
      loads: [{ id: 'l', bus: 'b', terminals: 'L1-N', amps, powerFactor: cos }],
    });

  it.each([0.02, 0.3, 0.5, 0.7, 0.9, 0.99])(
    'are solved at %d of the current that takes all volts',
    (share) => {
      const amps = (share * E) / Math.hypot(r, x);
      const right = Math.sqrt(E * E - (amps * aside) ** 2) - amps * along;
      // The error of |V| is the mismatch, sharpened to rounding, over what is left of the volts.
      expect(Math.abs(solveProduct(job(amps), 'design').loads[0]!.volts! - right)).toBeLessThan(1e-11);
    },
  );

  it('are refused where no volts are left', () => {
    const amps = (1.001 * E) / Math.hypot(r, x);
    expect(() => solveProduct(job(amps), 'design')).toThrow(/load l.*no solution at bus b/);
  });
});

it('a state whose volts point away from their source is none', () => {
  // 3000 A at nominal angle turn 240 V into 240 − 0.4·3000 = −960 V, and 10 W at −960 V would balance the equations.
  const job = twoBuses(10, 1, false, 0);
  job.loads!.push({ id: 'typed', bus: 'b', terminals: 'L1-N', amps: 3000, powerFactor: 1 });
  expect(() => solveProduct(job, 'design')).toThrow(
    /load l.*no solution at bus b.*point away from their source/,
  );
});

describe('rounds', () => {
  it.each([0.005, 0.02, 0.06])('at a drop of %d of the volts there are at most eight', (share) => {
    // V = (1 − d)·E at P = V·(E − V)/R.
    for (const x of [0, 0.2, 0.4]) {
      const watts = (share * (1 - share) * E * E) / R;
      expect(solveProduct(twoBuses(watts, 1, false, x), 'design').totals.iterations).toBeLessThanOrEqual(8);
    }
  });

  it('headroom goes to the collapse where no limit trips before', () => {
    // A current of i more beside constant power P: V = (E − R·i)/2 + √((E − R·i)²/4 − P·R), up to R·i = E − 2√(P·R).
    const watts = 9000;
    const parsed = parseJob({ ...twoBuses(watts, 1, false, 0), limits: { total: 90 } });
    if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
    const prepared = prepareJob(parsed.job);
    if (prepared.kind !== 'prepared') throw new Error(prepared.reason);
    const outcome = prepared.solve('each-circuit');
    if (outcome.kind !== 'solved') throw new Error(outcome.reason);
    const most = (E - 2 * Math.sqrt(watts * R)) / R;
    // The mismatch at which rounds count as settled, 10⁻¹⁰ of E, is some amperes·R of it.
    expect(Math.abs(outcome.solution.loads[0]!.headroomAmps! / most - 1)).toBeLessThan(1e-8);
  });
});
