import { jobSchema, MATERIALS, RACEWAYS } from '@farlug/solver/job';
import { ampacityAwg, ampacityMm2, conductorImpedance, motorAmps } from '@farlug/solver/tables';
import { describe, expect, it } from 'vitest';
import { thermalOf } from './dense/ampacity.ts';
import { conductorOhms } from './dense/conductors.ts';
import { D } from './dense/decimal.ts';
import { loadSize } from './dense/load-size.ts';
import { jobFile } from './support/job-file.ts';
import './support/ledger.ts';
import { reference } from './support/reference.ts';

/**
 * The product's look-ups beside a second look-up that reads fixtures/reference itself and applies temperature,
 * frequency and skin effect in its own way. The product's doubles beside fifty digits: 1e-14, some forty
 * roundings; amperes to 1e-12.
 */
const awgSizes = [
  ...new Set(
    reference<{ rows: { size: string; unit: string }[] }>('conductors-awg-dc').rows.map(
      (row) => `${row.size} ${row.unit}`,
    ),
  ),
];
const mm2Rows = reference<{
  rows: { area_mm2: number; cu_class2_plain: number | null; al_class1_class2: number | null }[];
}>('conductors-iec-dc').rows;

const theirs = (
  size: string,
  material: (typeof MATERIALS)[number],
  raceway: (typeof RACEWAYS)[number],
  frequency: number,
  temperature: number | null,
) => {
  const job = jobSchema.parse({
    ...jobFile({
      sources: [{ id: 's', bus: 'a', system: frequency === 0 ? 'dc-2w' : '1ph-2w', volts: 120 }],
      runs: [
        {
          id: 'r',
          kind: 'branch',
          from: 'a',
          to: 'b',
          length: 1,
          conductors: ['L1', 'N'],
          size,
          material,
          raceway,
          temperature,
        },
      ],
    }),
    frequency,
  });
  return conductorOhms(job, job.runs[0]!, 'L1', null);
};

const near = (value: number, wanted: number, what: string) =>
  expect(wanted === 0 ? value : value / wanted - 1, what).toBeWithin(1e-14, 'conductor ohms, relative');

describe('conductor ohms beside a second reading of the reference tables', () => {
  const conditions = [0, 50, 60, 400].flatMap((frequency) =>
    [null, 20, 90].map((temperature) => ({ frequency, temperature })),
  );
  it.each(conditions)('at $frequency Hz and $temperature °C', ({ frequency, temperature }) => {
    let compared = 0;
    for (const material of MATERIALS)
      for (const raceway of RACEWAYS) {
        const iec = mm2Rows.filter(
          (row) => (material === 'copper' ? row.cu_class2_plain : row.al_class1_class2) !== null,
        );
        for (const size of [...awgSizes, ...iec.map((row) => `${row.area_mm2} mm2`)]) {
          const ours = conductorImpedance({
            material,
            size,
            raceway,
            frequencyHz: frequency,
            temperatureC: temperature,
          });
          if (!ours.ok) throw new Error(`${material} ${size}: ${ours.message}`);
          const second = theirs(size, material, raceway, frequency, temperature);
          near(ours.rOhmPerM, second.re.toNumber(), `r of ${material} ${size}`);
          near(ours.xOhmPerM, second.im.toNumber(), `x of ${material} ${size}`);
          compared++;
        }
      }
    expect(compared).toBeGreaterThan(300);
  });
});

const sameAmps = (ours: ReturnType<typeof ampacityAwg>, wanted: number) => {
  if (!ours.ok) throw new Error(ours.message);
  expect(ours.amps - wanted).toBeWithin(1e-12, 'ampacity, A');
};

describe('full-load amps beside a second reading', () => {
  it('agree with what operating temperatures are computed from', () => {
    const run = (size: string, method: 'B1' | 'C' | null, insulation: 60 | 75 | 90 | 70, bundled: number) =>
      jobSchema.parse(
        jobFile({
          sources: [{ id: 's', bus: 'a', system: '3ph-4w', volts: 208 }],
          runs: [
            {
              id: 'r',
              kind: 'feeder',
              from: 'a',
              to: 'b',
              length: 1,
              conductors: ['L1', 'L2', 'L3', 'N'],
              size,
              method,
              insulation,
              bundled,
            },
          ],
        }),
      );
    for (const insulation of [60, 75, 90] as const)
      for (const bundled of [1, 3, 4, 9, 10, 50]) {
        const job = run('2 AWG', null, insulation, bundled);
        const ours = ampacityAwg({ material: 'copper', size: '2 AWG', columnC: insulation, bundled });
        sameAmps(ours, thermalOf(job, job.runs[0]!, 'L1').fullAmps.toNumber());
      }
    for (const insulation of [70, 90] as const)
      for (const circuits of [1, 2, 6, 9]) {
        const job = run('25 mm2', 'B1', insulation, circuits);
        const ours = ampacityMm2({
          material: 'copper',
          size: '25 mm2',
          method: 'B1',
          insulationC: insulation,
          loaded: 3,
          circuits,
        });
        sameAmps(ours, thermalOf(job, job.runs[0]!, 'L1').fullAmps.toNumber());
      }
  });

  it.each([
    [120, false],
    [208 / Math.sqrt(3), false],
    [200, false],
    [208, true],
    [230, true],
    [240, false],
    [480, true],
    [575, true],
  ])('motors at %d V, three-phase: %s', (volts, three) => {
    const job = jobSchema.parse(
      jobFile({
        sources: [{ id: 's', bus: 'a', system: '3ph-4w', volts }],
        loads: [{ id: 'm', bus: 'a', terminals: three ? 'three-phase' : 'L1-N', hp: 1.5 }],
      }),
    );
    const ours = motorAmps({ hp: 1.5, phases: three ? 3 : 1, volts });
    expect(ours.ok && ours.amps).toBe(loadSize(job, job.loads[0]!, D(volts)).amps.toNumber());
  });
});
