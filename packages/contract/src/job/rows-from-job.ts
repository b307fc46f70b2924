import type { Job } from '@farlug/solver/job';
import { newId } from '../edit/new-id.ts';
import type { JobRowLists, Row, WireUnit } from '../rows/index.ts';
import { blankBus, blankJob, blankLoad, blankRun, blankSource, blankTransformer } from './blank-rows.ts';
import { limitRowsOf } from './limits-rows.ts';
import { orderKeys } from './order-keys.ts';
import { overlayRows } from './overlay-rows.ts';
import { decimalOf, decimalOrNull, loadQuantityOf } from './quantity.ts';

/**
 * The rows of a job file: everything the file says, and circuits for branch pieces and feeders that leave a bus
 * without standing in its panel's list, so that nothing of the network is out of sight.
 */
export function rowsFromJob(job: Job, makeId: () => string = newId): JobRowLists {
  const buses = busRows(job, makeId);
  const busId = new Map(buses.map((bus) => [bus.code, bus.id]));
  const runs = runRows(job, busId, makeId);
  const loads = loadRows(job, busId, new Map(runs.map((run) => [run.code, run.id])), makeId);
  const transformerKeys = orderKeys(job.transformers.length);
  const sourceKeys = orderKeys(job.sources.length);
  return {
    job: [jobRowOf(job, makeId)],
    limit: limitRowsOf(job.limits, makeId),
    bus: buses,
    source: job.sources.map((source, i) => ({
      ...blankSource({
        id: makeId(),
        code: source.id,
        orderKey: sourceKeys[i]!,
        busId: busId.get(source.bus)!,
        system: source.system,
      }),
      volts: decimalOf(source.volts),
      openVolts: decimalOrNull(source.openVolts),
      off: source.off,
      impedanceR: decimalOrNull(source.impedance?.r ?? null),
      impedanceX: decimalOrNull(source.impedance?.x ?? null),
      faultAmps: decimalOrNull(source.fault?.amps ?? null),
      faultXOverR: decimalOrNull(source.fault?.xOverR ?? null),
    })),
    ...overlayRows(job, { busId, runs, loads }, makeId),
    transformer: job.transformers.map((one, i) => ({
      ...blankTransformer({
        id: makeId(),
        code: one.id,
        orderKey: transformerKeys[i]!,
        fromBusId: busId.get(one.from)!,
        toBusId: busId.get(one.to)!,
        connection: one.connection,
        system: one.system,
      }),
      kva: decimalOf(one.kva),
      primaryVolts: decimalOf(one.primaryVolts),
      secondaryVolts: decimalOf(one.secondaryVolts),
      primary: one.primary,
      percentZ: decimalOf(one.percentZ),
      xOverR: decimalOf(one.xOverR),
      tapPercent: one.tapPercent === 0 ? null : decimalOf(one.tapPercent),
    })),
    conductor: job.conductorRows.map((row) => ({
      id: makeId(),
      name: row.name,
      material: row.material,
      areaMm2: decimalOf(row.areaMm2),
      r: decimalOf(row.r),
      x: decimalOf(row.x),
      per: row.per,
      temperature: decimalOf(row.temperature),
      ampacity: decimalOrNull(row.ampacity),
      source: row.source,
    })),
    reading: job.readings.map((reading) => ({
      id: makeId(),
      busId: busId.get(reading.bus)!,
      terminals: reading.terminals,
      volts: decimalOf(reading.volts),
      amps: decimalOrNull(reading.amps),
      at: reading.at,
    })),
    draft: [],
  };
}

function jobRowOf(job: Job, makeId: () => string): Row<'job'> {
  return {
    ...blankJob({ id: makeId(), name: job.name, lengthUnit: job.lengthUnit, wireUnit: wireUnitOf(job) }),
    address: job.address,
    frequency: decimalOf(job.frequency),
    basis: job.basis,
    angle: job.angle,
    limitBasis: job.limits.basis,
    limitForce: job.limits.force,
    includeService: job.limits.includeService,
    includeTransformer: job.limits.includeTransformer,
    includeSource: job.limits.includeSource,
    longRun: job.limits.longRun,
  };
}

/** The kind of sizes that most runs have; metres go with mm² where no run has a size. */
function wireUnitOf(job: Job): WireUnit {
  const sizes = job.runs.map((run) => run.size).filter((size) => size !== null);
  const metric = sizes.filter((size) => /mm(2|²)$/.test(size)).length;
  if (sizes.length === 0) return job.lengthUnit === 'm' ? 'mm2' : 'awg';
  return metric * 2 > sizes.length ? 'mm2' : 'awg';
}

/** Buses of the file, then those that only another entry names, in the order in which they are first named. */
export function busCodes(job: Job): string[] {
  return [
    ...new Set([
      ...job.buses.map((bus) => bus.id),
      ...job.sources.map((source) => source.bus),
      ...job.runs.flatMap((run) => [run.from, run.to]),
      ...job.transformers.flatMap((one) => [one.from, one.to]),
      ...job.loads.flatMap((load) => (load.bus === null ? [] : [load.bus])),
      ...job.panels.map((panel) => panel.bus),
      ...job.readings.map((reading) => reading.bus),
    ]),
  ];
}

function busRows(job: Job, makeId: () => string): Row<'bus'>[] {
  const listed = new Map(job.buses.map((bus) => [bus.id, bus]));
  const codes = busCodes(job);
  const keys = orderKeys(codes.length);
  return codes.map((code, i) => {
    const { name = null, kind = 'junction' as const } = listed.get(code) ?? {};
    return { ...blankBus({ id: makeId(), code, orderKey: keys[i]! }), name, kind };
  });
}

function runRows(job: Job, busId: ReadonlyMap<string, string>, makeId: () => string): Row<'run'>[] {
  const keys = orderKeys(job.runs.length);
  return job.runs.map((run, i) => ({
    ...blankRun({
      id: makeId(),
      code: run.id,
      orderKey: keys[i]!,
      kind: run.kind,
      fromBusId: busId.get(run.from)!,
      toBusId: busId.get(run.to)!,
      conductors: run.conductors,
    }),
    name: run.name,
    length: `${decimalOf(run.length)} ${job.lengthUnit}`,
    open: run.open,
    material: run.material,
    size: run.size,
    neutralSize: run.neutralSize,
    sets: run.sets,
    raceway: run.raceway,
    temperature: run.temperature === 'operating' ? null : decimalOrNull(run.temperature),
    temperatureOperating: run.temperature === 'operating',
    ambient: decimalOrNull(run.ambient),
    insulation: run.insulation,
    terminals: run.terminals,
    bundled: run.bundled,
    method: run.method,
    groundingSize: run.groundingSize,
    protection: run.protection,
    ohmsR: decimalOrNull(run.ohms?.r ?? null),
    ohmsX: decimalOrNull(run.ohms?.x ?? null),
    ohmsPer: run.ohms?.per ?? null,
    ohmsNeutralR: decimalOrNull(run.ohms?.neutral?.r ?? null),
    ohmsNeutralX: decimalOrNull(run.ohms?.neutral?.x ?? null),
    demand: run.demand === 1 ? null : decimalOf(run.demand),
    breakerAmps: decimalOrNull(run.breaker?.amps ?? null),
    breakerPoles: run.breaker?.poles ?? null,
    locked: run.locked,
  }));
}

function loadRows(
  job: Job,
  busId: ReadonlyMap<string, string>,
  runId: ReadonlyMap<string, string>,
  makeId: () => string,
): Row<'load'>[] {
  const keys = orderKeys(job.loads.length);
  const unlessDefault = (value: number, usual: number) => (value === usual ? null : decimalOf(value));
  return job.loads.map((load, i) => ({
    ...blankLoad({ id: makeId(), code: load.id, orderKey: keys[i]!, terminals: load.terminals }),
    busId: load.bus === null ? null : busId.get(load.bus)!,
    alongRunId: load.along === null ? null : (runId.get(load.along) ?? null),
    name: load.name,
    size: loadQuantityOf(load),
    powerFactor: decimalOrNull(load.powerFactor),
    leading: load.leading,
    quantity: unlessDefault(load.quantity, 1),
    behaviour: load.behaviour,
    demand: unlessDefault(load.demand, 1),
    demandVa: decimalOrNull(load.demandVa),
    minimum: unlessDefault(load.minimum, 0),
    continuous: load.continuous,
    class: load.class,
    ratedVolts: decimalOrNull(load.ratedVolts),
    startingAmps: decimalOrNull(load.starting?.amps ?? null),
    startingPowerFactor: decimalOrNull(load.starting?.powerFactor ?? null),
  }));
}
