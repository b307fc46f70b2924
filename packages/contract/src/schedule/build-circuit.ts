import type { CircuitKind, Conductor } from '@farlug/solver/job';
import { newId } from '../edit/index.ts';
import {
  blankBreaker,
  blankBus,
  blankCircuit,
  blankLoad,
  blankRun,
  lineOfSpace,
  spacesOfBreaker,
} from '../job/index.ts';
import { proposedPowerFactor } from '../presets/defaults.ts';
import type { JobRows, Row } from '../rows/index.ts';
import { inConductorOrder, terminalsOf, usualTerminals } from './reline.ts';
import type { RowChanges } from './row-changes.ts';

export interface BreakerSpec {
  space: number;
  poles: number;
  half?: 'a' | 'b' | null;
  amps?: string | null;
}
export interface CircuitSpec {
  kind: CircuitKind;
  breakers: readonly BreakerSpec[];
  circuit?: Partial<Row<'circuit'>>;
  /** Pull a neutral with a multi-pole circuit; a single pole always has one. */
  neutral?: boolean;
  /** Spread the load along the run instead of at its end. */
  spread?: boolean;
  run?: Partial<Row<'run'>>;
  /** One for each load; none gives one that is still to be filled in. */
  loads?: readonly Partial<Row<'load'>>[];
}

/**
 * A branch circuit with its run, its end and its loads, or a spare or reserved space without any. Several
 * single-pole breakers make a multiwire circuit: one home run, and a load to neutral for each pole.
 */
export function buildCircuit(changes: RowChanges, panel: Row<'panel'>, spec: CircuitSpec): Row<'circuit'> {
  const circuit = changes.insert('circuit', {
    ...blankCircuit({ id: newId(), orderKey: changes.nextKey('circuit'), panelId: panel.id }),
    kind: spec.kind,
    ...spec.circuit,
  });
  for (const { space, poles, half = null, amps = null } of spec.breakers)
    changes.insert('breaker', {
      ...blankBreaker({ id: newId(), circuitId: circuit.id, space, poles }),
      half,
      amps,
    });
  if (spec.kind !== 'branch') return circuit;

  const lines = linesOfBreakers(panel, spec.breakers);
  const multiwire = spec.breakers.length > 1 && lines.length > 1;
  const neutral = lines.length === 1 || multiwire || spec.neutral === true;
  const code = codeOfSpec(changes.rows, panel, spec.breakers);
  const end = changes.insert('bus', {
    ...blankBus({
      id: newId(),
      code: changes.freshCode('bus', `${code}-end`),
      orderKey: changes.nextKey('bus'),
    }),
    kind: 'outlet',
  });
  const run = changes.insert('run', {
    ...blankRun({
      id: newId(),
      code: changes.freshCode('run', code),
      orderKey: changes.nextKey('run'),
      kind: 'branch',
      fromBusId: panel.busId,
      toBusId: end.id,
      conductors: neutral ? [...lines, 'N'] : lines,
    }),
    circuitId: circuit.id,
    ...spec.run,
  });
  const loads = spec.loads && spec.loads.length > 0 ? spec.loads : multiwire ? lines.map(() => ({})) : [{}];
  loads.forEach((given, i) => {
    const terminals = multiwire ? terminalsOf([lines[i % lines.length]!, 'N']) : usualTerminals(lines);
    const place = spec.spread ? { alongRunId: run.id } : { busId: end.id };
    insertLoad(
      changes,
      { ...place, terminals, circuitId: circuit.id, ...given },
      loads.length > 1 ? `${code}${letter(i)}` : code,
    );
  });
  return circuit;
}

/** A load with the power factor of its class, marked as assumed, where none is given. */
export function insertLoad(
  changes: RowChanges,
  given: Partial<Row<'load'>> & Pick<Row<'load'>, 'terminals'>,
  code: string,
): Row<'load'> {
  const alternating = Number([...changes.rows.job.values()][0]?.frequency ?? '60') > 0;
  const assumed = alternating && (given.powerFactor ?? null) === null;
  return changes.insert('load', {
    ...blankLoad({
      id: newId(),
      code: changes.freshCode('load', code),
      orderKey: changes.nextKey('load'),
      terminals: given.terminals,
    }),
    ...given,
    ...(assumed
      ? { powerFactor: proposedPowerFactor(given.class ?? 'equipment'), powerFactorAssumed: true }
      : {}),
  });
}

export const letter = (i: number): string => String.fromCharCode(97 + (i % 26));

export function linesOfBreakers(panel: Row<'panel'>, breakers: readonly BreakerSpec[]): Conductor[] {
  const spaces = breakers.flatMap((breaker) => spacesOfBreaker(panel.layout, breaker));
  const lines = [...new Set(spaces.map((space) => lineOfSpace(panel, space)))];
  return inConductorOrder(lines.length > 0 ? lines : panel.lines.slice(0, 1));
}

/** The code of the circuit's run: the panel's and the spaces that it is given now; it stays when the circuit moves. */
export function codeOfSpec(rows: JobRows, panel: Row<'panel'>, breakers: readonly BreakerSpec[]): string {
  const spaces = breakers.flatMap((breaker) => spacesOfBreaker(panel.layout, breaker)).sort((a, b) => a - b);
  const panelCode = rows.bus.get(panel.busId)!.code;
  return spaces.length === 0
    ? `${panelCode}-x`
    : `${panelCode}-${spaces.join('/')}${breakers[0]?.half ?? ''}`;
}

export const jobRowOf = (rows: JobRows): Row<'job'> => [...rows.job.values()][0]!;
