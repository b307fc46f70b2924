import { type BusSystem, busSystems, type Job, jobSchema } from '@farlug/solver/job';
import { inOrder } from '../job/index.ts';
import type { JobRows } from '../rows/index.ts';

/**
 * The supply system at every bus, of rows that may be incomplete: lengths and sizes do not matter for it.
 * By bus id; a bus without a path to a source that states its volts is missing.
 */
export function systemsOfRows(rows: JobRows): Map<string, BusSystem> {
  const header = [...rows.job.values()][0]!;
  const job: Job = {
    ...BLANK,
    frequency: Number(header.frequency),
    sources: inOrder(rows.source.values())
      .filter((row) => Number(row.volts) > 0)
      .map((row) => ({
        id: row.id,
        bus: row.busId,
        system: row.system,
        volts: Number(row.volts),
        openVolts: null,
        off: row.off,
        impedance: null,
        fault: null,
      })),
    runs: inOrder(rows.run.values()).map((row) => ({
      ...RUN,
      id: row.id,
      kind: row.kind,
      from: row.fromBusId,
      to: row.toBusId,
      open: row.open,
      conductors: row.conductors,
    })),
    transformers: inOrder(rows.transformer.values())
      .filter((row) => Number(row.primaryVolts) > 0 && Number(row.secondaryVolts) > 0)
      .map((row) => ({
        id: row.id,
        from: row.fromBusId,
        to: row.toBusId,
        kva: 1,
        primaryVolts: Number(row.primaryVolts),
        secondaryVolts: Number(row.secondaryVolts),
        connection: row.connection,
        primary: row.primary,
        percentZ: 1,
        xOverR: 0,
        tapPercent: 0,
        system: row.system,
      })),
  };
  return busSystems(job);
}

const BLANK: Job = jobSchema.parse({ format: 'farlug-job/1', name: '-', lengthUnit: 'm', sources: [] });
const RUN = jobSchema.parse({
  ...BLANK,
  runs: [{ id: '-', kind: 'branch', from: 'a', to: 'b', length: 0, conductors: ['L1'] }],
}).runs[0]!;

/** `480Y/277 V`, `208Y/120 V`, `120/240 V`, `230 V`, `48 V DC`. */
export function systemText({ origin: { system, volts } }: Pick<BusSystem, 'origin'>): string {
  const round = (value: number) => String(Math.round(value * 10) / 10);
  switch (system) {
    case 'dc-2w':
      return `${round(volts)} V DC`;
    case '1ph-2w':
      return `${round(volts)} V`;
    case '1ph-3w':
      return `${round(volts / 2)}/${round(volts)} V`;
    case '1ph-3w-wye':
      return `${round(volts)}Y/${toNeutral(volts)} V, two legs`;
    case '3ph-3w':
      return `${round(volts)} V, three-wire`;
    case '3ph-4w':
      return `${round(volts)}Y/${toNeutral(volts)} V`;
    case '3ph-4w-delta':
      return `${round(volts)}/${round(volts / 2)} V delta, high leg L2`;
  }
}

/** Line to neutral in whole volts, as systems are named: 277 of 480, 120 of 208, 230 of 400 (231 by division). */
const toNeutral = (volts: number): string => {
  const named: Record<string, string> = { 400: '230', 415: '240', 380: '220' };
  return named[String(volts)] ?? String(Math.round(volts / Math.sqrt(3)));
};
