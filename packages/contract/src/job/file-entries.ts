import type { Bus, ConductorRow, Job, Load, Panel, Run, Source, Transformer } from '@farlug/solver/job';
import type { Row } from '../rows/index.ts';
import type { CircuitPlace } from './overlay-entries.ts';
import { lengthIn, loadSizeOf, numberOrNull } from './quantity.ts';

/** Complete rows as entries of the job file. */
type CodeOf = (busId: string) => string;

export const busEntry = (row: Row<'bus'>): Bus => ({ id: row.code, name: row.name, kind: row.kind });

export const sourceEntry = (row: Row<'source'>, codeOf: CodeOf): Source => ({
  id: row.code,
  bus: codeOf(row.busId),
  system: row.system,
  volts: Number(row.volts),
  openVolts: numberOrNull(row.openVolts),
  off: row.off,
  impedance: row.impedanceR === null ? null : { r: Number(row.impedanceR), x: Number(row.impedanceX ?? '0') },
  fault:
    row.faultAmps === null ? null : { amps: Number(row.faultAmps), xOverR: Number(row.faultXOverR ?? '0') },
});

export function runEntry(
  row: Row<'run'>,
  codeOf: CodeOf,
  unit: Job['lengthUnit'],
  circuit: Pick<CircuitPlace, 'spaces' | 'breaker'> | null,
): Run {
  const spaces = circuit?.spaces ?? [];
  return {
    id: row.code,
    kind: row.kind,
    name: row.name,
    from: codeOf(row.fromBusId),
    to: codeOf(row.toBusId),
    length: lengthIn(row.length!, unit),
    open: row.open,
    conductors: row.conductors,
    material: row.material,
    size: row.size,
    neutralSize: row.neutralSize,
    sets: row.sets,
    raceway: row.raceway ?? 'pvc',
    temperature: row.temperatureOperating ? 'operating' : numberOrNull(row.temperature),
    ambient: numberOrNull(row.ambient),
    insulation: row.insulation as Run['insulation'],
    terminals: row.terminals as Run['terminals'],
    bundled: row.bundled,
    method: row.method,
    groundingSize: row.groundingSize,
    protection: row.protection,
    ohms: ohmsOf(row),
    demand: Number(row.demand ?? '1'),
    breaker: breakerOf(row, circuit?.breaker ?? null),
    circuit: spaces.length === 0 ? null : spaces.join(','),
    locked: row.locked,
  };
}

function ohmsOf(row: Row<'run'>): Run['ohms'] {
  if (row.ohmsR === null || row.ohmsPer === null) return null;
  const own = row.ohmsNeutralR !== null || row.ohmsNeutralX !== null;
  return {
    r: Number(row.ohmsR),
    x: Number(row.ohmsX ?? '0'),
    per: row.ohmsPer,
    neutral: own ? { r: numberOrNull(row.ohmsNeutralR), x: numberOrNull(row.ohmsNeutralX) } : null,
  };
}

/** A run's own breaker, else its circuit's. */
export function breakerOf(
  row: Pick<Row<'run'>, 'breakerAmps' | 'breakerPoles'>,
  ofCircuit: Row<'breaker'> | null,
): Run['breaker'] {
  const { amps, poles } =
    row.breakerAmps === null
      ? { amps: ofCircuit?.amps ?? null, poles: ofCircuit?.poles ?? 1 }
      : { amps: row.breakerAmps, poles: row.breakerPoles ?? 1 };
  return amps === null ? null : { amps: Number(amps), poles: poles as 1 | 2 | 3 };
}

export const transformerEntry = (row: Row<'transformer'>, codeOf: CodeOf): Transformer => ({
  id: row.code,
  from: codeOf(row.fromBusId),
  to: codeOf(row.toBusId),
  kva: Number(row.kva),
  primaryVolts: Number(row.primaryVolts),
  secondaryVolts: Number(row.secondaryVolts),
  connection: row.connection,
  primary: row.primary,
  percentZ: Number(row.percentZ),
  xOverR: Number(row.xOverR),
  tapPercent: Number(row.tapPercent ?? '0'),
  system: row.system,
});

export const loadEntry = (row: Row<'load'>, codeOf: CodeOf, runCode: CodeOf): Load => ({
  id: row.code,
  name: row.name,
  bus: row.busId === null ? null : codeOf(row.busId),
  terminals: row.terminals,
  ...loadSizeOf(row.size!),
  powerFactor: numberOrNull(row.powerFactor),
  leading: row.leading,
  quantity: Number(row.quantity ?? '1'),
  behaviour: row.behaviour,
  demand: Number(row.demand ?? '1'),
  demandVa: numberOrNull(row.demandVa),
  minimum: Number(row.minimum ?? '0'),
  continuous: row.continuous,
  class: row.class,
  ratedVolts: numberOrNull(row.ratedVolts),
  along: row.alongRunId === null ? null : runCode(row.alongRunId),
  starting:
    row.startingAmps === null
      ? null
      : { amps: Number(row.startingAmps), powerFactor: Number(row.startingPowerFactor) },
});

export const panelEntry = (row: Row<'panel'>, codeOf: CodeOf, circuits: Panel['circuits']): Panel => ({
  bus: codeOf(row.busId),
  spaces: row.spaces,
  layout: row.layout,
  lines: row.lines,
  mainAmps: numberOrNull(row.mainAmps),
  circuits,
});

export const conductorEntry = (row: Row<'conductor'>): ConductorRow => ({
  name: row.name,
  material: row.material,
  areaMm2: Number(row.areaMm2),
  r: Number(row.r),
  x: Number(row.x),
  per: row.per,
  temperature: Number(row.temperature),
  ampacity: numberOrNull(row.ampacity),
  source: row.source,
});

export const readingEntry = (row: Row<'reading'>, codeOf: CodeOf): Job['readings'][number] => ({
  bus: codeOf(row.busId),
  terminals: row.terminals,
  volts: Number(row.volts),
  amps: numberOrNull(row.amps),
  at: row.at,
});
