import { complex, inv, lusolve, type Matrix, matrix } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { type Random, randomFrom } from '../../test/support/random.ts';
import { addProduct, addUnit, invert, PACKED } from './blocks.ts';
import { FourWireNetwork, inverseDiagonal, RangeMaximum, RealNetwork, WorstDrop } from './index.ts';

/** Runs between buses 0 … buses − 1 and the source `buses`: a tree in random order, and some that close rings. */
function randomRuns(random: Random, buses: number, closing: number, grown: boolean) {
  const runs: [number, number][] = [];
  for (let i = 0; i < buses; i++) {
    const parent = i === 0 || random.chance(0.1) ? buses : random.whole(Math.max(0, i - 4), i - 1);
    runs.push([parent, i]);
  }
  for (let k = 0; k < closing; k++) {
    const a = random.whole(0, buses);
    const b = random.whole(0, buses);
    if (a !== b) runs.push([a, b]);
  }
  if (!grown) {
    const name = shuffle(
      random,
      Array.from({ length: buses }, (_, i) => i),
    );
    const named = (bus: number) => name[bus] ?? buses;
    const turned = shuffle(random, runs).map(([a, b]) => (random.chance(0.5) ? [a, b] : [b, a]));
    return {
      from: Int32Array.from(turned, ([a]) => named(a!)),
      to: Int32Array.from(turned, ([, b]) => named(b!)),
    };
  }
  return { from: Int32Array.from(runs, ([a]) => a), to: Int32Array.from(runs, ([, b]) => b) };
}

function shuffle<T>(random: Random, list: readonly T[]): T[] {
  const next = [...list];
  for (let i = next.length - 1; i > 0; i--) {
    const j = random.whole(0, i);
    [next[i], next[j]] = [next[j]!, next[i]!];
  }
  return next;
}

const CASES = [
  ['a tree in order', 0, true],
  ['a tree shuffled', 0, false],
  ['rings in order', 6, true],
  ['rings shuffled', 6, false],
  ['rings in rings', 25, false],
] as const;

/** Volts lost by mathjs' dense LU on the node equations. */
function denseReal(buses: number, from: Int32Array, to: Int32Array, ohms: Float64Array, amps: Float64Array) {
  const y = Array.from({ length: buses }, () => new Array<number>(buses).fill(0));
  for (let e = 0; e < from.length; e++) {
    const a = from[e]!;
    const b = to[e]!;
    for (const i of [a, b]) if (i < buses) y[i]![i]! += 1 / ohms[e]!;
    if (a < buses && b < buses) {
      y[a]![b]! -= 1 / ohms[e]!;
      y[b]![a]! -= 1 / ohms[e]!;
    }
  }
  return (lusolve(y, [...amps]) as unknown as number[][]).map(([v]) => v!);
}

function realCase(seed: number, closing: number, grown: boolean) {
  const random = randomFrom(seed);
  const buses = random.whole(2, 40);
  const { from, to } = randomRuns(random, buses, closing, grown);
  const ohms = Float64Array.from(from, () => random.between(0.01, 2));
  const amps = Float64Array.from({ length: buses }, (_, i) =>
    i === 0 || random.chance(0.6) ? random.between(0.5, 20) : 0,
  );
  const network = new RealNetwork(buses, from, to);
  network.setOhms(ohms);
  const volts = new Float64Array(buses + 1);
  network.solve(amps, volts);
  return { random, buses, from, to, ohms, amps, network, volts };
}

/** Both sides work in double precision on matrices of condition below 1e5. */
const TOLERANCE = 1e-10;

describe('a network of one conductor', () => {
  it.each(CASES)('%s: what mathjs’ dense LU gives', (_, closing, grown) => {
    for (let seed = 1; seed <= 60; seed++) {
      const { buses, from, to, ohms, amps, volts } = realCase(seed, closing, grown);
      const dense = denseReal(buses, from, to, ohms, amps);
      const largest = Math.max(...dense);
      for (let i = 0; i < buses; i++)
        expect(Math.abs(volts[i]! - dense[i]!), `seed ${seed}, bus ${i}`).toBeLessThan(TOLERANCE * largest);
      expect(volts[buses]).toBe(0);
    }
  });

  it('gives NaN where no source reaches a bus, rings there included, and solves the rest', () => {
    const from = Int32Array.from([4, 1, 2, 3]);
    const to = Int32Array.from([0, 2, 3, 1]);
    const network = new RealNetwork(4, from, to);
    network.setOhms(Float64Array.from([2, 1, 1, 1]));
    const volts = new Float64Array(5);
    network.solve(Float64Array.from([3, 1, 1, 1]), volts);
    expect([...volts]).toEqual([6, Number.NaN, Number.NaN, Number.NaN, 0]);
  });

  it('finds the resistance that each unknown of a ring sees', () => {
    // Between the ends of a chain that is tied to the source at both: R_k = a·(n − a)·r / n, a runs from one end.
    const n = 7;
    const from = Int32Array.from({ length: n }, (_, i) => (i === 0 ? n - 1 : i - 1));
    const to = Int32Array.from({ length: n }, (_, i) => i);
    const network = new RealNetwork(
      n - 1,
      from,
      Int32Array.from(to, (i) => Math.min(i, n - 1)),
    );
    network.setOhms(new Float64Array(n).fill(0.5));
    const seen = inverseDiagonal(network.factor!);
    for (let i = 0; i < n - 1; i++) {
      const { rings, forest } = network;
      const u = rings!.step.findIndex((k) => (forest.bus ? forest.bus[k] : k) === i);
      const a = i + 1;
      expect(seen[rings!.elimination.position[u]!]).toBeCloseTo((a * (n - a) * 0.5) / n, 14);
    }
  });
});

describe('the worst drop while runs and loads change', () => {
  it.each(CASES)('%s: what a whole solution gives after each of many changes', (_, closing, grown) => {
    for (let seed = 1; seed <= 25; seed++) {
      const { random, buses, from, to, ohms, amps, network, volts } = realCase(seed, closing, grown);
      const judged = (bus: number) => bus % 3 !== 1 || buses < 4;
      const live = new WorstDrop(network, ohms, amps, volts, judged);
      const changed = { ohms: ohms.slice(), amps: amps.slice() };
      const fresh = new RealNetwork(buses, from, to);
      const now = new Float64Array(buses + 1);
      const worstOf = (at: Float64Array) => {
        fresh.setOhms(at);
        fresh.solve(changed.amps, now);
        return Math.max(...[...now.keys()].filter((i) => i < buses && judged(i)).map((i) => now[i]!));
      };
      for (let edit = 0; edit < 20; edit++) {
        if (random.chance(0.5)) {
          const e = random.whole(0, from.length - 1);
          changed.ohms[e] = random.between(0.01, 2);
          live.setOhms(e, changed.ohms[e]);
        } else {
          const bus = random.whole(0, buses - 1);
          changed.amps[bus] = random.between(0.1, 20);
          live.setAmps(bus, changed.amps[bus]);
        }
        const worst = worstOf(changed.ohms);
        expect(Math.abs(live.volts - worst), `seed ${seed}, edit ${edit}`).toBeLessThan(TOLERANCE * worst);
        expect(now[live.bus]).toBeCloseTo(worst, 8);
      }
      const run = random.whole(0, from.length - 1);
      const sizes = [0.005, 0.1, changed.ohms[run]!, 3, 50];
      const found = new Float64Array(sizes.length);
      live.ofSizes(run, sizes, found);
      for (const [i, size] of sizes.entries()) {
        const other = changed.ohms.slice();
        other[run] = size;
        const worst = worstOf(other);
        expect(Math.abs(found[i]! - worst), `seed ${seed}, size ${size}`).toBeLessThan(TOLERANCE * worst);
      }
    }
  });

  it('keeps maxima over ranges as a plain search finds them', () => {
    const random = randomFrom(5);
    const plain = Array.from({ length: 37 }, () => random.between(-1, 1));
    const tree = new RangeMaximum(Float64Array.from(plain));
    for (let k = 0; k < 200; k++) {
      const from = random.whole(0, 37);
      const end = random.whole(from, 37);
      tree.add(from, end, k / 64);
      for (let i = from; i < end; i++) plain[i]! += k / 64;
      expect(tree.maximum).toBeCloseTo(Math.max(...plain), 12);
      expect(plain[tree.place]).toBeCloseTo(Math.max(...plain), 12);
      const a = random.whole(0, 37);
      const b = random.whole(a, 37);
      expect(tree.maximumOf(a, b)).toBeCloseTo(Math.max(...plain.slice(a, b)), 12);
    }
  });
});

/** Symmetric impedances whose real part is positive definite: strong self, weak mutual values. */
function randomBlock(random: Random, scale: number): { re: number[]; im: number[] } {
  const re: number[] = [];
  const im: number[] = [];
  for (let i = 0; i < 4; i++)
    for (let j = i; j < 4; j++) {
      re.push(scale * (i === j ? random.between(1, 3) : random.between(-0.2, 0.2)));
      im.push(scale * (i === j ? random.between(0.2, 1) : random.between(0, 0.3)));
    }
  return { re, im };
}

function fourWireCase(seed: number, closing: number, grown: boolean) {
  const random = randomFrom(seed);
  const buses = random.whole(2, 14);
  const { from, to } = randomRuns(random, buses, closing, grown);
  const blocks = Array.from(from, () => randomBlock(random, 0.3));
  const zRe = Float64Array.from(blocks.flatMap(({ re }) => re));
  const zIm = Float64Array.from(blocks.flatMap(({ im }) => im));
  const shuntBuses = Array.from({ length: buses }, (_, i) => i).filter(() => random.chance(0.3));
  const shunts = shuntBuses.map(() => randomBlock(random, 0.4));
  const bRe = Float64Array.from({ length: 4 * buses }, () => random.between(-9, 9));
  const bIm = Float64Array.from({ length: 4 * buses }, () => random.between(-9, 9));
  return {
    buses,
    from,
    to,
    zRe,
    zIm,
    bRe,
    bIm,
    shunts: {
      bus: Int32Array.from(shuntBuses),
      yRe: Float64Array.from(shunts.flatMap(({ re }) => re)),
      yIm: Float64Array.from(shunts.flatMap(({ im }) => im)),
    },
  };
}

/** The same by mathjs: admittance blocks by its inverse, the node equations by its dense LU. */
function denseFourWire(net: ReturnType<typeof fourWireCase>, withShunts: boolean) {
  const n = 4 * net.buses;
  const y = Array.from({ length: n }, () => Array.from({ length: n }, () => complex(0, 0)));
  const put = (a: number, b: number, block: { re: number; im: number }[][], sign: number) => {
    if (a === net.buses || b === net.buses) return;
    for (let i = 0; i < 4; i++)
      for (let j = 0; j < 4; j++) {
        const at = y[4 * a + i]![4 * b + j]!;
        y[4 * a + i]![4 * b + j] = complex(at.re + sign * block[i]![j]!.re, at.im + sign * block[i]![j]!.im);
      }
  };
  const full = (re: Float64Array, im: Float64Array, k: number) =>
    Array.from({ length: 4 }, (_, i) =>
      Array.from({ length: 4 }, (_, j) =>
        complex(re[10 * k + PACKED[4 * i + j]!]!, im[10 * k + PACKED[4 * i + j]!]!),
      ),
    );
  for (const [e, a] of net.from.entries()) {
    const b = net.to[e]!;
    const block = (inv(matrix(full(net.zRe, net.zIm, e) as never)) as unknown as Matrix).toArray() as never;
    put(a, a, block, 1);
    put(b, b, block, 1);
    put(a, b, block, -1);
    put(b, a, block, -1);
  }
  if (withShunts)
    for (const [k, bus] of net.shunts.bus.entries())
      put(bus, bus, full(net.shunts.yRe, net.shunts.yIm, k) as never, 1);
  const right = Array.from(net.bRe, (re, i) => [complex(re, net.bIm[i]!)]);
  const solution = lusolve(matrix(y as never), right as never) as unknown as Matrix;
  return (solution.toArray() as unknown as { re: number; im: number }[][]).map(([v]) => v!);
}

describe('a network of four coupled conductors', () => {
  it.each(CASES)('%s: what mathjs’ dense LU gives, with shunts and without', (_, closing, grown) => {
    for (let seed = 1; seed <= 12; seed++)
      for (const withShunts of [false, true]) {
        const net = fourWireCase(seed, closing, grown);
        const network = new FourWireNetwork(net.buses, net.from, net.to);
        expect(network.setValues(net.zRe, net.zIm, withShunts ? net.shunts : null)).toBe(-1);
        const vRe = new Float64Array(4 * net.buses + 4);
        const vIm = new Float64Array(4 * net.buses + 4);
        network.solve(net.bRe, net.bIm, vRe, vIm);
        const dense = denseFourWire(net, withShunts);
        const largest = Math.max(...dense.map(({ re, im }) => Math.hypot(re, im)));
        for (const [i, v] of dense.entries())
          expect(Math.hypot(vRe[i]! - v.re, vIm[i]! - v.im), `seed ${seed}, row ${i}`).toBeLessThan(
            TOLERANCE * largest,
          );
      }
  });

  it('says at which bus nothing determines the volts', () => {
    // A shunt that exactly cancels its run: 1 + Z·S is singular.
    const one = [1, 0, 0, 0, 1, 0, 0, 1, 0, 1];
    const network = new FourWireNetwork(2, Int32Array.from([2, 0]), Int32Array.from([0, 1]));
    const shunts = {
      bus: Int32Array.from([1]),
      yRe: Float64Array.from(one, (v) => -v),
      yIm: new Float64Array(10),
    };
    expect(network.setValues(Float64Array.from([...one, ...one]), new Float64Array(20), shunts)).toBe(1);
  });

  it('inverts blocks whose pivots have to be exchanged, and refuses singular ones', () => {
    const re = Float64Array.from([0, 0, 0, 2, 0, 0, 3, 0, 0, 4, 0, 0, 5, 0, 0, 0]);
    const im = Float64Array.from([0, 1, 0, 0, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 1]);
    const [inverseRe, inverseIm] = [re.slice(), im.slice()];
    expect(invert(inverseRe, inverseIm, 0)).toBe(true);
    const product = { re: new Float64Array(16), im: new Float64Array(16) };
    addProduct(false, re, im, 0, inverseRe, inverseIm, 0, product.re, product.im, 0);
    const unit = new Float64Array(16);
    addUnit(unit, 0);
    for (let i = 0; i < 16; i++) {
      expect(product.re[i]).toBeCloseTo(unit[i]!, 14);
      expect(product.im[i]).toBeCloseTo(0, 14);
    }
    expect(invert(new Float64Array(16), new Float64Array(16), 0)).toBe(false);
  });
});
