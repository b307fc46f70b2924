// The sparse LDLᵀ on radial networks, edge list in and all voltages out, beside mathjs' sparse LU in the same run.
import { lusolve, slu, sparse } from 'mathjs';
import { analyse, factor, patternOf, solve } from '../src/linear/index.ts';
import { line, measure } from './measure.ts';

const out = (text: string) => void process.stdout.write(text);

/** A tree of n unknowns in which each hangs on one before it; the first is tied to the source. */
function tree(n: number) {
  const a = Int32Array.from({ length: n - 1 }, (_, i) => i + 1);
  const b = Int32Array.from({ length: n - 1 }, (_, i) =>
    Math.floor((((i * 2_654_435_761) % 4_294_967_296) / 4_294_967_296) * (i + 1)),
  );
  return { n, a, b };
}

function ours({ n, a, b }: ReturnType<typeof tree>) {
  const symbolic = analyse(patternOf(n, a, b));
  const edges = symbolic.pattern.edgeCount;
  const shuntRe = new Float64Array(n);
  shuntRe[0] = 100;
  const outcome = factor(symbolic, {
    branchRe: new Float64Array(edges).fill(20),
    branchIm: new Float64Array(edges),
    shuntRe,
    shuntIm: new Float64Array(n),
  });
  if (!outcome.ok) throw new Error('the tree is tied to its source');
  const re = new Float64Array(n).fill(-0.01);
  solve(outcome.factor, re, new Float64Array(n));
  return re;
}

function peer({ n, a, b }: ReturnType<typeof tree>) {
  const diagonal = new Float64Array(n);
  diagonal[0] = 100;
  const entries: [number, number, number][] = [];
  for (let k = 0; k < a.length; k++) {
    diagonal[a[k]!]! += 20;
    diagonal[b[k]!]! += 20;
    entries.push([a[k]!, b[k]!, -20], [b[k]!, a[k]!, -20]);
  }
  const matrix = sparse();
  matrix.resize([n, n]);
  for (let i = 0; i < n; i++) matrix.set([i, i], diagonal[i]!);
  for (const [i, j, y] of entries) matrix.set([i, j], y);
  return lusolve(
    slu(matrix, 1, 1e-3),
    Array.from({ length: n }, () => [-0.01]),
  );
}

out(`${'step'.padEnd(52)}${'median'.padStart(10)}      10 % … 90 %\n`);
for (const n of [1_000, 10_000, 100_000, 1_000_000]) {
  const times = n > 100_000 ? 5 : 15;
  const own = measure(() => tree(n), ours, times);
  out(line(`radial, ${n.toLocaleString('en-US')} unknowns: analyse, factor, solve`, own));
  if (n > 1_000) continue;
  const other = measure(() => tree(n), peer, 3);
  out(line('the same by mathjs slu', other, `ratio ${(other.median / own.median).toFixed(0)}`));
}
