import type { JobFile } from '@farlug/solver/job';

export type SourceFile = JobFile['sources'][number];
export type RunFile = NonNullable<JobFile['runs']>[number];
export type LoadFile = NonNullable<JobFile['loads']>[number];
export type TransformerFile = NonNullable<JobFile['transformers']>[number];

/** A job file in metres at 60 Hz around the parts that a case is about. */
export const jobFile = (parts: Partial<JobFile> & { sources: SourceFile[] }): JobFile => ({
  format: 'farlug-job/1',
  name: 'case',
  lengthUnit: 'm',
  ...parts,
});

/** A run of one kilometre whose ohms are those of the whole run. */
export const ohmRun = (
  id: string,
  from: string,
  to: string,
  conductors: RunFile['conductors'],
  r: number,
  x = 0,
  more: Partial<RunFile> & { neutral?: { r?: number; x?: number } } = {},
): RunFile => {
  const { neutral, ...rest } = more;
  return {
    id,
    kind: 'branch',
    from,
    to,
    length: 1000,
    conductors,
    ohms: { r, x, per: 'km', ...(neutral ? { neutral } : {}) },
    ...rest,
  };
};

/** Amps and power factor of a sink whose phasor is `degrees` against the nominal EMF between its terminals. */
export const phasorSink = (amps: number, degrees: number): Partial<LoadFile> => ({
  amps,
  powerFactor: Math.cos((degrees * Math.PI) / 180),
  leading: degrees > 0,
});

/** An impedance load of `r + jx` ohms at `volts` nominal. */
export const ohmLoad = (r: number, x: number, volts: number): Partial<LoadFile> => ({
  behaviour: 'impedance',
  amps: volts / Math.hypot(r, x),
  powerFactor: r / Math.hypot(r, x),
  leading: x < 0,
});
