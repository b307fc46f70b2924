import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { type Job, type JobFile, type Phasor, parseJob } from '../job/index.ts';
import { type Equations, nodalEquations } from './node-equations.ts';

const jobOf = (file: unknown): Job => {
  const parsed = parseJob(file);
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
  return parsed.job;
};
const written = (job: Job, options: Parameters<typeof nodalEquations>[1] = {}): Equations => {
  const outcome = nodalEquations(job, options);
  if (!outcome.ok) throw new Error(outcome.reason);
  return outcome;
};
const at = (equations: Equations, node: string) => equations.equations.find((each) => each.node === node)!;

/** 50 Ω per km over 1 m: 0.05 Ω in each conductor, so that every conductance is 20 S. */
const wire = { conductors: ['L1', 'N'], length: 1, ohms: { r: 50, x: 0, per: 'km' } } as const;
const cabin: JobFile = {
  format: 'farlug-job/1',
  name: 'three points',
  frequency: 0,
  basis: 'resistance',
  lengthUnit: 'm',
  limits: {},
  sources: [{ id: 'battery', bus: 'A', system: 'dc-2w', volts: 48 }],
  runs: [
    { id: 'F1', kind: 'feeder', from: 'A', to: 'B', ...wire, conductors: ['L1', 'N'] },
    { id: 'F2', kind: 'branch', from: 'B', to: 'C', ...wire, conductors: ['L1', 'N'] },
  ],
  loads: [
    { id: 'lamp', bus: 'B', terminals: 'L1-N', amps: 10 },
    { id: 'pump', bus: 'C', terminals: 'L1-N', amps: 4 },
  ],
};

describe('node equations by inspection', () => {
  // By hand: 14 A in F1 lose 0.7 V in either conductor, 4 A in F2 a further 0.2 V.
  it('sums conductances on the diagonal, joins neighbours by minus one, and has the currents at the right', () => {
    const equations = written(jobOf(cabin));
    const b = at(equations, 'B.L1');
    expect(b.own[0]).toBeCloseTo(40, 9);
    expect(b.terms.map(({ node, y }) => [node, y[0]])).toEqual([
      ['A.L1', expect.closeTo(-20, 9)],
      ['C.L1', expect.closeTo(-20, 9)],
    ]);
    expect(b.right[0]).toBeCloseTo(-10, 12);
    expect(b.volts[0]).toBeCloseTo(47.3, 10);
    expect(at(equations, 'B.N').volts[0]).toBeCloseTo(0.7, 10);
    expect(at(equations, 'C.N').right[0]).toBeCloseTo(4, 12);
    expect(at(equations, 'C.L1').volts[0]).toBeCloseTo(47.1, 10);
    expect(equations.kclResidual).toBeLessThan(1e-9);
    expect(equations.condition).toBeGreaterThanOrEqual(1);
  });

  it('writes them in names and with numbers', () => {
    const equations = written(jobOf(cabin));
    expect(at(equations, 'B.L1')).toMatchObject({
      symbols: '(1/R(F1.L1) + 1/R(F2.L1))·V(B.L1) − 1/R(F1.L1)·V(A.L1) − 1/R(F2.L1)·V(C.L1) = −I(lamp)',
      text: '40·V(B.L1) − 20·V(A.L1) − 20·V(C.L1) = −10 A',
    });
    expect(at(equations, 'A.L1').text).toBe('V(A.L1) = 48 V, given');
    expect(equations.impedances.map(({ name, value }) => `${name} ${value[0]}`)).toContain('R(F1.L1) 0.05');
    expect(equations.currents.map(({ name }) => name)).toEqual(['I(lamp)', 'I(pump)']);
  });

  it('moves what lies outside the chosen points to the right, at its solved volts', () => {
    const { matrix, solution, neighbours } = written(jobOf(cabin), { buses: ['C'] });
    expect(neighbours.map(({ name, value }) => [name, value[0]])).toEqual([
      ['V(B.L1)', expect.closeTo(47.3, 10)],
      ['V(B.N)', expect.closeTo(0.7, 10)],
    ]);
    expect(matrix.nodes).toEqual(['C.L1', 'C.N']);
    expect(matrix.y[0]![0]![0]).toBeCloseTo(20, 9);
    expect(matrix.right[0]![0]).toBeCloseTo(20 * 47.3 - 4, 8);
    expect(solution[0]![0]).toBeCloseTo(47.1, 10);
  });

  it('names a bus that is not there', () => {
    expect(nodalEquations(jobOf(cabin), { buses: ['attic'] })).toEqual({
      ok: false,
      at: 'bus attic',
      reason: 'no bus of the job has this id',
    });
  });

  const folder = new URL('../../../../fixtures/jobs/', import.meta.url);
  const files = readdirSync(folder).filter((file) => /^(?!.*unfinished).*json$/.test(file));
  it.each(files)('%s: symmetric, solved by its solution, and closed at every node', (file) => {
    const equations = written(jobOf(JSON.parse(readFileSync(new URL(file, folder), 'utf8'))));
    const { matrix, solution } = equations;
    // Both sides are sums of products as large as |y|·|V|: 1e-9 of those is far above rounding and below any error.
    for (const [r, row] of matrix.y.entries()) {
      let sum: Phasor = [-matrix.right[r]![0], -matrix.right[r]![1]];
      let scale = 1;
      for (const [c, y] of row.entries()) {
        expect(y[0]).toBe(matrix.y[c]![r]![0]);
        expect(y[1]).toBe(matrix.y[c]![r]![1]);
        const v = solution[c]!;
        sum = [sum[0] + y[0] * v[0] - y[1] * v[1], sum[1] + y[0] * v[1] + y[1] * v[0]];
        scale = Math.max(scale, Math.hypot(...y) * Math.hypot(...v));
      }
      expect(Math.hypot(...sum) / scale).toBeLessThan(1e-9);
    }
    expect(equations.kclResidual).toBeLessThan(1e-9);
  });
});
