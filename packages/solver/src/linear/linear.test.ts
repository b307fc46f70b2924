import { complex, inv, lusolve, type Matrix, matrix } from 'mathjs';
import { describe, expect, it } from 'vitest';
import {
  analyse,
  conditionEstimate,
  factor,
  pathSolver,
  refine,
  residual,
  selectedInverse,
  solve,
  solveSmall,
} from './index.ts';

/** A network of n unknowns: coupled pairs with admittances, and an admittance to the source at some of them. */
interface Net {
  n: number;
  pairs: [number, number, number, number][];
  shunts: [number, number, number][];
}

const factored = ({ n, pairs, shunts }: Net) => {
  const symbolic = analyse(
    n,
    pairs.map(([a]) => a),
    pairs.map(([, b]) => b),
  );
  const branchRe = Float64Array.from(pairs, ([, , re]) => re);
  const branchIm = Float64Array.from(pairs, ([, , , im]) => im);
  const shuntRe = new Float64Array(n);
  const shuntIm = new Float64Array(n);
  for (const [at, re, im] of shunts) {
    shuntRe[at]! += re;
    shuntIm[at]! += im;
  }
  return { symbolic, outcome: factor(symbolic, { branchRe, branchIm, shuntRe, shuntIm }) };
};
const done = (net: Net) => {
  const { outcome } = factored(net);
  if (!outcome.ok) throw new Error(`no pivot at ${outcome.unknown}`);
  return outcome.factor;
};

function admittances({ n, pairs, shunts }: Net) {
  const y = Array.from({ length: n }, () => Array.from({ length: n }, () => complex(0, 0)));
  const add = (i: number, j: number, r: number, x: number) => {
    y[i]![j] = complex(y[i]![j]!.re + r, y[i]![j]!.im + x);
  };
  for (const [a, b, r, x] of pairs) {
    add(a, a, r, x);
    add(b, b, r, x);
    add(a, b, -r, -x);
    add(b, a, -r, -x);
  }
  for (const [at, r, x] of shunts) add(at, at, r, x);
  return y;
}

/** The same by mathjs' dense LU. */
function byMathjs(net: Net, re: readonly number[], im: readonly number[]): [number, number][] {
  const y = admittances(net);
  const solution = lusolve(
    matrix(y as never),
    re.map((r, i) => [complex(r, im[i]!)]) as never,
  ) as unknown as Matrix;
  return (solution.toArray() as unknown as { re: number; im: number }[][]).map(([v]) => [v!.re, v!.im]);
}

/** ‖A‖₁·‖A⁻¹‖₁ by mathjs' inverse. */
function conditionByMathjs(net: Net): number {
  const norm = (m: { re: number; im: number }[][]) =>
    Math.max(...m.map((_, j) => m.reduce((sum, row) => sum + Math.hypot(row[j]!.re, row[j]!.im), 0)));
  const y = admittances(net);
  return norm(y) * norm((inv(matrix(y as never)) as unknown as Matrix).toArray() as never);
}

const TREE: Net = {
  n: 6,
  pairs: [
    [0, 1, 20, -3],
    [1, 2, 5, -1],
    [1, 3, 8, -2],
    [3, 4, 0.4, -0.1],
    [3, 5, 12, -4],
  ],
  shunts: [[0, 90, -60]],
};
/** Two rings that share a bus, and two unknowns joined twice. */
const MESH: Net = {
  n: 6,
  pairs: [...TREE.pairs, [2, 4, 3, -1], [0, 5, 2, -0.5], [0, 1, 7, -1]],
  shunts: [
    [0, 90, -60],
    [4, 0.01, 0],
  ],
};
/** Two networks that are not coupled. */
const APART: Net = {
  n: 6,
  pairs: [
    [0, 1, 20, -3],
    [1, 2, 5, -1],
    [3, 4, 0.4, -0.1],
    [4, 5, 12, -4],
    [3, 5, 1, 0],
  ],
  shunts: [
    [0, 90, -60],
    [3, 10, 0],
  ],
};
const RE = [0, -3, 1, -16, 4, -2];
const IM = [1, 2, 0, 5, -1, 0];

describe('sparse LDLᵀ on branches and shunts', () => {
  it.each([
    ['a tree', TREE],
    ['rings', MESH],
  ])('%s: what mathjs’ dense LU gives', (_, net) => {
    const re = Float64Array.from(RE);
    const im = Float64Array.from(IM);
    solve(done(net), re, im);
    // Both work in double precision on a matrix of condition below 1e4: twelve digits are left.
    for (const [i, [r, x]] of byMathjs(net, RE, IM).entries()) {
      expect(re[i]).toBeCloseTo(r, 11);
      expect(im[i]).toBeCloseTo(x, 11);
    }
  });

  it('takes several right sides one after the other', () => {
    const once = [Float64Array.from(RE), Float64Array.from(IM)] as const;
    solve(done(TREE), ...once);
    const twice = [
      Float64Array.from([...RE, ...RE.map((v) => 2 * v)]),
      Float64Array.from([...IM, ...IM.map((v) => 2 * v)]),
    ] as const;
    solve(done(TREE), ...twice, 2);
    expect([...twice[0].slice(0, 6)]).toEqual([...once[0]]);
    for (let i = 0; i < 6; i++) expect(twice[0][6 + i]).toBeCloseTo(2 * once[0][i]!, 12);
  });

  it('gives radial networks no fill-in, and eliminates each unknown once', () => {
    const { symbolic } = factored(TREE);
    expect(symbolic.rows.length).toBe(TREE.pairs.length);
    expect([...factored(MESH).symbolic.order].sort()).toEqual([0, 1, 2, 3, 4, 5]);
  });

  it('says at which unknown a pivot is not there', () => {
    const { outcome } = factored({ n: 3, pairs: [[0, 1, 5, 0]], shunts: [[0, 1, 0]] });
    expect(outcome).toEqual({ ok: false, unknown: 2 });
  });

  it('keeps the digits of a thin run beside thick ones: conductances over 12 orders of magnitude', () => {
    // By hand: 1 A through 1e6 S, 1e-6 S and 1e6 S in a row.
    const net: Net = {
      n: 3,
      pairs: [
        [0, 1, 1e-6, 0],
        [1, 2, 1e6, 0],
      ],
      shunts: [[0, 1e6, 0]],
    };
    const re = Float64Array.from([0, 0, 1]);
    solve(done(net), re, new Float64Array(3));
    expect(re[0]).toBeCloseTo(1e-6, 20);
    expect(re[1]! / (1e6 + 1e-6)).toBeCloseTo(1, 14);
    expect((re[2]! - re[1]!) / 1e-6).toBeCloseTo(1, 3);
  });

  it('has no residual, and refines nothing any more', () => {
    const solver = done(MESH);
    const [re, im] = [Float64Array.from(RE), Float64Array.from(IM)];
    solve(solver, re, im);
    const [rRe, rIm] = [new Float64Array(6), new Float64Array(6)];
    residual(solver, re, im, Float64Array.from(RE), Float64Array.from(IM), rRe, rIm);
    for (let i = 0; i < 6; i++) expect(Math.hypot(rRe[i]!, rIm[i]!)).toBeLessThan(1e-12);
    expect(refine(solver, re, im, Float64Array.from(RE), Float64Array.from(IM))).toBeLessThan(1e-13);
  });

  it('solves along the path of a few unknowns as it solves the whole', () => {
    const solver = done(MESH);
    const [re, im] = [new Float64Array(6), new Float64Array(6)];
    re[4] = -3;
    im[4] = 1;
    solve(solver, re, im);
    const path = pathSolver(solver);
    path.reach([4, 2]);
    path.clear();
    path.add(4, -3, 1);
    path.solve();
    for (const i of [2, 4]) {
      expect(path.re(i)).toBeCloseTo(re[i]!, 13);
      expect(path.im(i)).toBeCloseTo(im[i]!, 13);
    }
  });

  it('finds entries of the inverse from the structure of L alone, as whole solutions give them', () => {
    for (const net of [TREE, MESH, APART]) {
      const solver = done(net);
      const found = selectedInverse(solver);
      for (let j = 0; j < net.n; j++) {
        const [re, im] = [new Float64Array(net.n), new Float64Array(net.n)];
        re[j] = 1;
        solve(solver, re, im);
        for (let i = 0; i < net.n; i++) {
          const entry = found.entry(i, j);
          if (!entry) continue;
          expect(entry[0], `${i} ${j}`).toBeCloseTo(re[i]!, 13);
          expect(entry[1], `${i} ${j}`).toBeCloseTo(im[i]!, 13);
        }
        expect(found.entry(j, j)).not.toBeNull();
      }
    }
  });
  it('has every entry of the inverse between places of trees', () => {
    const found = selectedInverse(done(TREE));
    for (let i = 0; i < 6; i++) for (let j = 0; j < 6; j++) expect(found.entry(i, j)).not.toBeNull();
  });
  it('estimates the condition of a matrix from below, within a small factor', () => {
    for (const net of [TREE, MESH, APART]) {
      const exact = conditionByMathjs(net);
      const estimate = conditionEstimate(done(net));
      expect(estimate).toBeLessThanOrEqual(exact * (1 + 1e-9));
      // Higham and Tisseur (2000) observe that the estimate is almost always within a factor 3.
      expect(estimate).toBeGreaterThan(exact / 3);
    }
  });
  it('solves a small dense system with its rows exchanged, and refuses a singular one', () => {
    // By hand: j·y = 1 + j and 2·x = 4.
    const a = Float64Array.from([0, 0, 0, 1, 2, 0, 0, 0]);
    const b = Float64Array.from([1, 1, 4, 0]);
    expect(solveSmall(a, b, 2, 1)).toBe(true);
    expect([...b]).toEqual([2, 0, 1, -1]);
    expect(solveSmall(new Float64Array(8), new Float64Array(4), 2, 1)).toBe(false);
  });
});
