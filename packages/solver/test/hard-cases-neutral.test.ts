import { abs, add, type Complex, complex, divide, multiply, subtract } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmLoad, ohmRun } from './support/job-file.ts';
import { solveProduct } from './support/solvers.ts';

/**
 * A neutral that is nearly lost: 10⁴ Ω beside lines of 0.1 Ω. With impedance loads the neutral at the far end stands
 * where Millman's theorem puts it: V = Σ E·y / Σ y over the branches that meet there, y of each line with its load, of
 * the neutral with no EMF. Worked with other arithmetic; the neutral's conductance is 10⁻⁵ of the lines', which costs no
 * digits, so the volts agree to rounding: some 10⁻¹⁴ of 120 V.
 */
const LOST = 1e4;
const LINE = 0.1;
const CLOSE = 1e-11;

const of = (re: number, im = 0): Complex => complex(re, im);
const sum = (list: Complex[]): Complex => list.reduce((a, b) => add(a, b) as Complex, of(0));
const inverse = (z: Complex): Complex => divide(1, z) as unknown as Complex;

/** Of EMFs behind lines and loads: the far neutral, and the volts at each load. */
const millman = (emfs: Complex[], loads: Complex[], neutral: number) => {
  const y = loads.map((z) => inverse(add(z, LINE) as Complex));
  const pushed = sum(emfs.map((emf, k) => multiply(emf, y[k]!) as Complex));
  const star = divide(pushed, add(sum(y), 1 / neutral)) as Complex;
  const volts = emfs.map((emf, k) =>
    abs(multiply(multiply(subtract(emf, star), y[k]!), loads[k]!) as Complex),
  );
  return { star, volts: volts as unknown as number[] };
};

const load = (id: string, terminals: LoadFile['terminals'], more: Partial<LoadFile>): LoadFile => ({
  id,
  bus: 'B',
  terminals,
  ...more,
});

describe('a neutral of ten thousand ohms', () => {
  it.each([
    ['resistances', of(10), of(40)],
    ['with reactance', of(6, 8), of(50, -20)],
    ['very unequal', of(0.5), of(2000, 300)],
  ])('mid-point system, %s: the legs share 240 V by their impedances', (_, one, other) => {
    const solution = solveProduct(
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '1ph-3w', volts: 240 }],
        runs: [ohmRun('c', 'A', 'B', ['L1', 'L2', 'N'], LINE, 0, { neutral: { r: LOST } })],
        loads: [
          load('one', 'L1-N', ohmLoad(one.re, one.im, 120)),
          load('other', 'L2-N', ohmLoad(other.re, other.im, 120)),
        ],
      }),
      'design',
    );
    const { star, volts } = millman([of(120), of(-120)], [one, other], LOST);
    expect(Math.abs(solution.loads[0]!.volts! - volts[0]!)).toBeLessThan(CLOSE * 240);
    expect(Math.abs(solution.loads[1]!.volts! - volts[1]!)).toBeLessThan(CLOSE * 240);
    const [re, im] = solution.buses.find(({ id }) => id === 'B')!.phasors!.N!;
    expect(Math.hypot(re - star.re, im - star.im)).toBeLessThan(CLOSE * 240);
    // Near the plain divider of a neutral that is gone: what the neutral still carries is 120 V/10⁴ Ω at most.
    const divided = abs(
      divide(multiply(240, one), add(add(one, other), 2 * LINE) as Complex) as Complex,
    ) as unknown as number;
    const parallel = abs(
      divide(multiply(one, other), add(one, other) as Complex) as Complex,
    ) as unknown as number;
    expect(Math.abs(solution.loads[0]!.volts! - divided)).toBeLessThan((2 * 120 * parallel) / LOST);
  });

  it('three lines of a wye', () => {
    const loads = [of(12, 4), of(30), of(90, -25)];
    const volts = 120 * Math.sqrt(3);
    const solution = solveProduct(
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '3ph-4w', volts }],
        runs: [ohmRun('c', 'A', 'B', ['L1', 'L2', 'L3', 'N'], LINE, 0, { neutral: { r: LOST } })],
        loads: loads.map((z, k) => load(`l${k}`, `L${(k + 1) as 1}-N`, ohmLoad(z.re, z.im, 120))),
      }),
      'design',
    );
    const emfs = [0, -120, 120].map((degrees) => {
      const angle = (degrees * Math.PI) / 180;
      return of(120 * Math.cos(angle), 120 * Math.sin(angle));
    });
    const expected = millman(emfs, loads, LOST);
    for (const [k, right] of expected.volts.entries())
      expect(Math.abs(solution.loads[k]!.volts! - right)).toBeLessThan(CLOSE * 120);
    // The highest stands far above 120 V: that is what the what-if of a lost neutral is for.
    expect(Math.max(...expected.volts)).toBeGreaterThan(165);
  });

  it('in turns: each leg alone leaves nearly all of its volts in the neutral', () => {
    const solution = solveProduct(
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '1ph-3w', volts: 240 }],
        runs: [ohmRun('c', 'A', 'B', ['L1', 'L2', 'N'], LINE, 0, { neutral: { r: LOST } })],
        loads: [load('one', 'L1-N', ohmLoad(10, 0, 120)), load('other', 'L2-N', ohmLoad(40, 0, 120))],
      }),
      'each-circuit',
    );
    // Alone: 120 · 10/(10 + 0.1 + 10⁴) and 120 · 40/(40 + 0.1 + 10⁴) V.
    expect(solution.loads.map(({ turn }) => turn)).toEqual(['L1', 'L2']);
    for (const [k, ohms] of [10, 40].entries()) {
      const right = (120 * ohms) / (ohms + LINE + LOST);
      expect(Math.abs(solution.loads[k]!.volts! - right)).toBeLessThan(CLOSE * 120);
    }
  });

  it('current loads: the difference of the legs flows through it, whatever volts that takes', () => {
    const solution = solveProduct(
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '1ph-3w', volts: 240 }],
        runs: [ohmRun('c', 'A', 'B', ['L1', 'L2', 'N'], LINE, 0, { neutral: { r: LOST } })],
        loads: [
          load('one', 'L1-N', { amps: 12, powerFactor: 1 }),
          load('other', 'L2-N', { amps: 12 - 2e-3, powerFactor: 1 }),
        ],
      }),
      'design',
    );
    // 2 mA · 10⁴ Ω = 20 V in the neutral: 120 − 1.2 − 20 and 120 − 1.1998 + 20 V. The difference of the amperes is known
    // to 10⁻¹² of itself, and so are its volts.
    const neutral = solution.buses.find(({ id }) => id === 'B')!.phasors!.N!;
    expect(Math.abs(neutral[0] - 20)).toBeLessThan(1e-10);
    expect(Math.abs(solution.loads[0]!.volts! - 98.8)).toBeLessThan(1e-10);
    expect(Math.abs(solution.loads[1]!.volts! - (140 - 1.1998))).toBeLessThan(1e-10);
    expect(Math.abs(solution.runs[0]!.amps!.N! - 2e-3)).toBeLessThan(1e-13);
  });
});
