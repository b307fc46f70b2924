import type { Job, Phasor, Source, System } from '../job/index.ts';

const SQRT3 = Math.sqrt(3);

/** (r, x) of magnitude `ohm` whose reactance is `xOverR` times its resistance. */
export function splitByRatio(ohm: number, xOverR: number): Phasor {
  const r = ohm / Math.sqrt(1 + xOverR * xOverR);
  return [r, r * xOverR];
}

/** Volts that drive the stated fault current through one line's impedance, as a share of the nominal volts. */
const FAULT_SHARE: Record<System, number> = {
  'dc-2w': 1,
  '1ph-2w': 1,
  '1ph-3w': 1 / 2,
  '1ph-3w-wye': 1 / SQRT3,
  '3ph-3w': 1 / SQRT3,
  '3ph-4w': 1 / SQRT3,
  '3ph-4w-delta': 1 / SQRT3,
};

/**
 * Impedance of a source in each of its line conductors, ohm, on the job's basis; [0, 0] where it states none.
 * A stated fault current gives |z| = V/(√3·I) three-phase, V/(2·I) line to line of `1ph-3w`, V/I line to neutral
 * and on direct current; the neutral is stiff.
 */
export function sourceOhms(job: Pick<Job, 'basis' | 'frequency'>, source: Source): Phasor {
  const [r, x] = source.impedance
    ? [source.impedance.r, source.impedance.x]
    : source.fault
      ? splitByRatio((source.volts * FAULT_SHARE[source.system]) / source.fault.amps, source.fault.xOverR)
      : [0, 0];
  return [r, job.basis === 'impedance' && job.frequency > 0 ? x : 0];
}
