import { describe, expect, it } from 'vitest';
import { notePrinted } from './support/ledger.ts';
import { SOLVERS } from './support/solvers.ts';
import { alternatingExamples } from './support/worked-alternating.ts';
import { directExamples } from './support/worked-direct.ts';
import { type Example, workedRows } from './support/worked-examples.ts';

const EXPRESSED: Record<string, Example> = { ...directExamples, ...alternatingExamples };

/** Published figures that no job file leads to, and why. */
const NOT_EXPRESSIBLE: Record<string, Record<string, string>> = {
  'doe-1011-3ph': {
    V_L: 'the handbook takes √3 as 1.73, which moves the printed digits',
    P: 'the handbook takes √3 as 1.73, which moves the printed digits',
    Q: 'the handbook takes √3 as 1.73, which moves the printed digits',
    S: 'the handbook takes √3 as 1.73, which moves the printed digits',
  },
  'mehta-13.20': {
    I_A: 'the book ends each side at the lowest point of the concentrated loads: its two sides meet at different volts',
    I_B: 'the book ends each side at the lowest point of the concentrated loads: its two sides meet at different volts',
    V_D: 'the book ends each side at the lowest point of the concentrated loads: its two sides meet at different volts',
  },
  'ecm-basics-2': { numerator: 'an intermediate product of the formula with √3 taken as 1.732' },
};

/** Within the tolerance of each printed answer (half a unit of its last digit unless the file says otherwise). */
const ROUNDING = 1e-9;

describe('published worked examples', () => {
  it('are each expressed as a job or listed with the reason why not', () => {
    for (const row of workedRows) {
      const excused = Object.keys(NOT_EXPRESSIBLE[row.id] ?? {});
      const left = row.answers.filter(({ quantity }) => !excused.includes(quantity));
      expect(left.length === 0, row.id).toBe(EXPRESSED[row.id] === undefined);
    }
    const ids = new Set([...Object.keys(EXPRESSED), ...Object.keys(NOT_EXPRESSIBLE)]);
    expect([...ids].sort()).toEqual(workedRows.map((row) => row.id).sort());
    expect(workedRows).toHaveLength(44);
  });

  describe.each(SOLVERS)('by the %s solver', (_, solve) => {
    it.each(workedRows.filter((row) => EXPRESSED[row.id]))('$id: $title', (row) => {
      const ours = EXPRESSED[row.id]!(solve);
      const excused = Object.keys(NOT_EXPRESSIBLE[row.id] ?? {});
      const wanted = row.answers.filter(({ quantity }) => !excused.includes(quantity));
      expect(Object.keys(ours).sort()).toEqual(wanted.map(({ quantity }) => quantity).sort());
      for (const { quantity, published, tolerance_abs, as_printed, unit } of wanted) {
        const off = Math.abs(ours[quantity]! - published);
        notePrinted(`${row.id} ${quantity}`, off, tolerance_abs);
        expect(off, `${quantity}: ${ours[quantity]} for ${as_printed} ${unit}`).toBeLessThanOrEqual(
          tolerance_abs + ROUNDING,
        );
      }
    });
  });
});
