import { type BusSystem, type Conductor, emfBetween, magnitude, pairConductors } from '@farlug/solver/job';
import { motorAmps } from '@farlug/solver/tables';
import { splitQuantity } from '../job/index.ts';
import type { Row } from '../rows/index.ts';

export interface LineVa {
  /** Volt-amperes that each line carries: half of a line-to-line load, a third of a three-phase one. */
  connected: Partial<Record<Conductor, number>>;
  demand: Partial<Record<Conductor, number>>;
}

/** Nominal volts between the terminals of a load; null where the bus has none. */
export function terminalVolts(terminals: Row<'load'>['terminals'], system: BusSystem): number | null {
  const [a, b] = terminals === 'three-phase' ? (['L1', 'L2'] as const) : pairConductors(terminals);
  const emf = emfBetween(system.origin.emfs, a, b);
  return emf && magnitude(emf);
}

/** What a load draws at its nominal volts, all of its quantity; null where its size or volts are not known. */
export function connectedVa(load: Row<'load'>, system: BusSystem): number | null {
  const volts = terminalVolts(load.terminals, system);
  if (load.size === null || volts === null) return null;
  const { number, unit } = splitQuantity(load.size);
  const amount = Number(number) * Number(load.quantity ?? '1');
  const perAmp = load.terminals === 'three-phase' ? Math.sqrt(3) * volts : volts;
  switch (unit) {
    case 'A':
      return amount * perAmp;
    case 'VA':
      return amount;
    case 'kVA':
      return amount * 1000;
    case 'W':
      return amount / Number(load.powerFactor ?? '1');
    case 'kW':
      return (amount * 1000) / Number(load.powerFactor ?? '1');
    default: {
      const motor = motorAmps({
        hp: Number(number),
        phases: load.terminals === 'three-phase' ? 3 : 1,
        volts,
      });
      return motor.ok ? motor.amps * Number(load.quantity ?? '1') * perAmp : null;
    }
  }
}

/** Volt-amperes of a load by line, connected and at design demand; generation counts for nothing here. */
export function loadVa(load: Row<'load'>, system: BusSystem): LineVa | null {
  const connected = connectedVa(load, system);
  if (connected === null) return null;
  if (connected < 0) return { connected: {}, demand: {} };
  const demand = load.demandVa === null ? connected * Number(load.demand ?? '1') : Number(load.demandVa);
  const lines = linesOf(load.terminals);
  const split = (va: number) => Object.fromEntries(lines.map((line) => [line, va / lines.length]));
  return { connected: split(connected), demand: split(demand) };
}

const linesOf = (terminals: Row<'load'>['terminals']): Conductor[] =>
  terminals === 'three-phase' ? ['L1', 'L2', 'L3'] : pairConductors(terminals).filter((one) => one !== 'N');
