import type { Conductor, JobFile } from '@farlug/solver/job';
import type { RunFile } from './job-file.ts';
import type { Random } from './random.ts';

export const randomLimits = (random: Random): JobFile['limits'] => {
  const maybe = <T>(probability: number, value: T): T | undefined =>
    random.chance(probability) ? value : undefined;
  return {
    feeder: maybe(0.7, random.between(0.5, 4)),
    branch: maybe(0.7, random.between(0.5, 4)),
    total: maybe(0.8, random.between(1, 7)),
    includeService: random.chance(0.3),
    includeTransformer: random.chance(0.3),
    includeSource: random.chance(0.2),
    longRun: random.chance(0.2),
    byClass: random.chance(0.4)
      ? { sensitive: { branch: random.between(0.2, 2), total: random.between(0.5, 3) }, motor: { feeder: 2 } }
      : undefined,
    starting: maybe(0.5, random.between(4, 15)),
    rise: maybe(0.4, random.between(0, 2)),
    lowestVolts: random.pick([undefined, undefined, 110, { '120': 112, '277': 260, '230': 215, '208': 195 }]),
    highestVolts: random.pick([undefined, undefined, undefined, { '120': 125, '240': 248 }]),
    rating: maybe(0.3, { low: random.between(88, 97), high: random.between(100, 110) }),
  };
};

const AWG_SMALL = ['14 AWG', '12 AWG', '10 AWG', '8 AWG', '6 AWG'];
const AWG_LARGE = ['2 AWG', '1/0 AWG', '3/0 AWG', '250 kcmil', '500 kcmil', '700 kcmil', '900 kcmil'];
const MM2_SMALL = ['1.5 mm2', '2.5 mm2', '4 mm2', '6 mm2', '10 mm2'];
const MM2_LARGE = ['25 mm2', '50 mm2', '95 mm2', '150 mm2', '240 mm2'];

/** Length, size or ohms, sets, temperature: what gives a run its impedance. */
export const randomSize = (
  random: Random,
  job: JobFile,
  conductors: readonly Conductor[],
  heavy: boolean,
  metric: boolean,
  iterated: boolean,
): Omit<RunFile, 'id' | 'kind' | 'from' | 'to' | 'conductors'> => {
  const feet = random.between(heavy ? 20 : 10, heavy ? 250 : 90);
  const length = job.lengthUnit === 'ft' ? feet : feet * 0.3048;
  const hasNeutral = conductors.includes('N');
  if (random.chance(0.15)) {
    const r = heavy ? random.between(0.02, 0.2) : random.between(0.3, 2);
    return {
      length,
      ohms: {
        r,
        x: random.chance(0.7) ? random.between(0, 0.1) : undefined,
        per: job.lengthUnit === 'ft' ? '1000ft' : 'km',
        neutral: random.chance(0.3)
          ? { r: r * random.between(0.5, 2), x: random.chance(0.5) ? random.between(0, 0.1) : undefined }
          : undefined,
      },
    };
  }
  const operates = (probability: number) => iterated && random.chance(probability);
  if (random.chance(0.05)) {
    const own = { length, size: firmRow(job, metric) };
    return operates(0.3) ? { ...own, temperature: 'operating', bundled: random.whole(1, 6) } : own;
  }
  const aluminum = heavy && random.chance(0.3);
  const small = metric ? MM2_SMALL : AWG_SMALL;
  const large = metric ? MM2_LARGE : AWG_LARGE;
  const list = heavy ? large : small;
  const at = random.whole(0, list.length - 1);
  const run: ReturnType<typeof randomSize> = {
    length,
    size: list[at],
    material: aluminum ? 'aluminum' : 'copper',
    raceway: random.pick(['pvc', 'aluminum', 'steel', 'cable']),
  };
  if (hasNeutral && random.chance(0.25)) run.neutralSize = list[Math.max(0, at - 1)];
  if (heavy && random.chance(0.2)) run.sets = random.whole(2, 3);
  if (random.chance(0.2)) run.temperature = random.between(20, 90);
  else if (operates(0.08)) {
    run.temperature = 'operating';
    run.insulation = metric ? random.pick([70, 90]) : random.pick([60, 75, 90]);
    if (random.chance(0.5)) run.ambient = random.between(15, 45);
    if (metric) run.method = random.pick(['A1', 'A2', 'B1', 'B2', 'C', 'D1', 'D2']);
    if (random.chance(0.4)) run.bundled = random.whole(1, metric ? 20 : 50);
  }
  return run;
};

const firmRow = (job: JobFile, metric: boolean): string => {
  const name = metric ? 'busway 100' : 'heavy busway';
  if (!job.conductorRows?.some((row) => row.name === name))
    job.conductorRows?.push({
      name,
      material: 'copper',
      areaMm2: 100,
      r: metric ? 0.2 : 0.06,
      x: metric ? 0.08 : 0.03,
      per: metric ? 'km' : '1000ft',
      temperature: metric ? 20 : 75,
      ampacity: 300,
      source: 'nameplate',
    });
  return name;
};
