import { z } from 'zod';
import {
  ANGLES,
  BASES,
  BEHAVIOURS,
  BUS_KINDS,
  CIRCUIT_KINDS,
  CONDUCTORS,
  FORCES,
  INSTALLATION_METHODS,
  LENGTH_UNITS,
  LOAD_CLASSES,
  MATERIALS,
  PAIRS,
  PANEL_LAYOUTS,
  PROTECTIONS,
  RACEWAYS,
  RUN_KINDS,
  SYSTEMS,
  TERMINALS,
  TRANSFORMER_CONNECTIONS,
} from './vocabulary.ts';

/**
 * The job file `farlug-job/1`: the one definition of a job for file, API and solver.
 * Strict: unknown keys are refused. `null` and absent mean the same, defaults are filled in.
 * Lengths are in `lengthUnit`, percents are of nominal volts, impedances in ohm, temperatures in °C.
 */

const orNull = <T extends z.ZodType>(schema: T) => schema.nullish().transform((v) => v ?? null);
const withDefault = <T extends z.ZodType>(schema: T, value: z.output<T>) =>
  schema.nullish().transform((v): z.output<T> => (v ?? value) as z.output<T>);

const ID_MAX = 80;
const TEXT_MAX = 400;
const id = z.string().min(1, 'must not be empty').max(ID_MAX, `must be at most ${ID_MAX} characters`);
const text = z.string().max(TEXT_MAX, `must be at most ${TEXT_MAX} characters`);
const positive = z.number().positive('must be > 0').max(1e9, 'must be ≤ 1e9');
const nonNegative = z.number().nonnegative('must be ≥ 0').max(1e9, 'must be ≤ 1e9');
const percent = z.number().nonnegative('must be ≥ 0').max(100, 'must be ≤ 100');
const powerFactor = z.number().positive('must be > 0').max(1, 'must be ≤ 1');
const factor = z.number().min(0, 'must be ≥ 0').max(1.5, 'must be ≤ 1.5');

const swapped = (pair: string) => {
  const [a, b] = pair.split('-');
  return `${b}-${a}`;
};
const inOrder = (value: unknown) =>
  typeof value === 'string' && (PAIRS as readonly string[]).includes(swapped(value)) ? swapped(value) : value;
const pair = z.preprocess(inOrder, z.enum(PAIRS));
const terminals = z.preprocess(inOrder, z.enum(TERMINALS));

const voltsOrMap = z.union([positive, z.record(z.string(), positive)]);
const classLimits = z.strictObject({
  feeder: orNull(percent),
  branch: orNull(percent),
  total: orNull(percent),
});
export const limitsSchema = z.strictObject({
  feeder: orNull(percent),
  branch: orNull(percent),
  total: orNull(percent),
  includeService: withDefault(z.boolean(), false),
  includeTransformer: withDefault(z.boolean(), false),
  includeSource: withDefault(z.boolean(), false),
  longRun: withDefault(z.boolean(), false),
  byClass: withDefault(z.partialRecord(z.enum(LOAD_CLASSES), classLimits), {}),
  starting: orNull(percent),
  rise: orNull(percent),
  lowestVolts: orNull(voltsOrMap),
  highestVolts: orNull(voltsOrMap),
  rating: orNull(
    z.strictObject({ low: orNull(z.number().min(0).max(200)), high: orNull(z.number().min(0).max(200)) }),
  ),
  basis: orNull(text),
  force: withDefault(z.enum(FORCES), 'recommendation'),
});
const NO_LIMITS = limitsSchema.parse({});

const impedance = z.strictObject({ r: nonNegative, x: withDefault(nonNegative, 0) });
const fault = z.strictObject({ amps: positive, xOverR: withDefault(nonNegative, 0) });
export const sourceSchema = z.strictObject({
  id,
  bus: id,
  system: z.enum(SYSTEMS),
  volts: positive,
  openVolts: orNull(positive),
  off: withDefault(z.boolean(), false),
  impedance: orNull(impedance),
  fault: orNull(fault),
});

export const busSchema = z.strictObject({
  id,
  name: orNull(text),
  kind: withDefault(z.enum(BUS_KINDS), 'junction'),
});

const ohmsSchema = z.strictObject({
  r: nonNegative,
  x: withDefault(nonNegative, 0),
  per: z.enum(['1000ft', 'km']),
  neutral: orNull(z.strictObject({ r: orNull(nonNegative), x: orNull(nonNegative) })),
});
export const runSchema = z.strictObject({
  id,
  kind: z.enum(RUN_KINDS),
  name: orNull(text),
  from: id,
  to: id,
  length: z.number().nonnegative('must be ≥ 0').max(1e6, 'must be ≤ 1,000,000'),
  open: withDefault(z.boolean(), false),
  conductors: z
    .array(z.enum(CONDUCTORS))
    .min(1, 'must name at least one conductor')
    .refine((list) => new Set(list).size === list.length, 'must name each conductor once'),
  material: withDefault(z.enum(MATERIALS), 'copper'),
  size: orNull(id),
  neutralSize: orNull(id),
  sets: withDefault(
    z.number().int('must be a whole number').min(1, 'must be ≥ 1').max(50, 'must be ≤ 50'),
    1,
  ),
  raceway: withDefault(z.enum(RACEWAYS), 'pvc'),
  temperature: orNull(z.union([z.number().min(-60).max(250), z.literal('operating')])),
  ambient: orNull(z.number().min(-60).max(90)),
  insulation: orNull(z.literal([60, 70, 75, 90])),
  terminals: orNull(z.literal([60, 75, 90])),
  bundled: orNull(z.number().int().min(1).max(200)),
  method: orNull(z.enum(INSTALLATION_METHODS)),
  groundingSize: orNull(id),
  protection: withDefault(z.enum(PROTECTIONS), 'general'),
  ohms: orNull(ohmsSchema),
  demand: withDefault(z.number().min(0, 'must be ≥ 0').max(1, 'must be ≤ 1'), 1),
  breaker: orNull(
    z.strictObject({
      amps: z.number().positive('must be > 0').max(10000, 'must be ≤ 10,000'),
      poles: z.literal([1, 2, 3]),
    }),
  ),
  circuit: orNull(text),
  locked: withDefault(z.boolean(), false),
});

export const transformerSchema = z.strictObject({
  id,
  from: id,
  to: id,
  kva: positive,
  primaryVolts: positive,
  secondaryVolts: positive,
  connection: z.enum(TRANSFORMER_CONNECTIONS),
  primary: withDefault(terminals, 'three-phase'),
  percentZ: z.number().positive('must be > 0').max(100, 'must be ≤ 100'),
  xOverR: nonNegative,
  tapPercent: withDefault(z.number().min(-20, 'must be ≥ −20').max(20, 'must be ≤ 20'), 0),
  system: z.enum(SYSTEMS),
});

const signed = z.number().min(-1e9, 'must be ≥ −1e9').max(1e9, 'must be ≤ 1e9');
export const loadSchema = z
  .strictObject({
    id,
    name: orNull(text),
    bus: orNull(id),
    terminals,
    amps: orNull(signed),
    va: orNull(signed),
    watts: orNull(signed),
    kw: orNull(signed),
    hp: orNull(signed),
    powerFactor: orNull(powerFactor),
    leading: withDefault(z.boolean(), false),
    quantity: withDefault(nonNegative, 1),
    behaviour: withDefault(z.enum(BEHAVIOURS), 'current'),
    demand: withDefault(factor, 1),
    demandVa: orNull(nonNegative),
    minimum: withDefault(factor, 0),
    continuous: withDefault(z.boolean(), false),
    class: withDefault(z.enum(LOAD_CLASSES), 'equipment'),
    ratedVolts: orNull(positive),
    along: orNull(id),
    starting: orNull(z.strictObject({ amps: positive, powerFactor })),
  })
  .superRefine((load, ctx) => {
    const given = (['amps', 'va', 'watts', 'kw', 'hp'] as const).filter((key) => load[key] !== null);
    if (given.length !== 1)
      ctx.addIssue({
        code: 'custom',
        message: `must have exactly one of amps, va, watts, kw, hp; has ${given.length === 0 ? 'none' : given.join(', ')}`,
      });
    if ((load.bus === null) === (load.along === null))
      ctx.addIssue({
        code: 'custom',
        path: ['bus'],
        message: 'must have either a bus or a run that it is spread along, not both and not neither',
      });
  });

export const panelSchema = z.strictObject({
  bus: id,
  spaces: z.number().int().min(1).max(200),
  layout: withDefault(z.enum(PANEL_LAYOUTS), 'two-column'),
  lines: z.array(z.enum(CONDUCTORS)).min(1).max(3),
  mainAmps: orNull(positive),
  circuits: withDefault(
    z.array(
      z.strictObject({
        spaces: z.array(z.number().int().min(1).max(200)),
        run: orNull(id),
        kind: withDefault(z.enum(CIRCUIT_KINDS), 'branch'),
        description: orNull(text),
      }),
    ),
    [],
  ),
});

/** A size of the firm's own: ohm per length of one conductor at `temperature`, and where the figures come from. */
export const conductorRowSchema = z.strictObject({
  name: id,
  material: z.enum(MATERIALS),
  areaMm2: positive,
  r: nonNegative,
  x: withDefault(nonNegative, 0),
  per: z.enum(['1000ft', 'km']),
  temperature: withDefault(z.number().min(-60).max(250), 75),
  ampacity: orNull(positive),
  source: z.string().min(1, 'must name the source of the figures').max(TEXT_MAX),
});

export const readingSchema = z.strictObject({
  bus: id,
  terminals: pair,
  volts: nonNegative,
  amps: orNull(signed),
  at: z.iso.datetime({ offset: true }),
});

const list = <T extends z.ZodType>(item: T) => withDefault(z.array(item), []);
export const jobSchema = z.strictObject({
  format: z.literal('farlug-job/1'),
  name: text.min(1, 'must not be empty'),
  address: orNull(text),
  frequency: withDefault(z.number().min(0, 'must be ≥ 0').max(1000, 'must be ≤ 1000'), 60),
  basis: withDefault(z.enum(BASES), 'impedance'),
  angle: withDefault(z.enum(ANGLES), 'nominal'),
  lengthUnit: z.enum(LENGTH_UNITS),
  limits: withDefault(limitsSchema, NO_LIMITS),
  sources: z.array(sourceSchema),
  buses: list(busSchema),
  runs: list(runSchema),
  transformers: list(transformerSchema),
  loads: list(loadSchema),
  panels: list(panelSchema),
  conductorRows: list(conductorRowSchema),
  readings: list(readingSchema),
});

/** A job as a person writes it: defaults may be left out. */
export type JobFile = z.input<typeof jobSchema>;
/** A job as the solver reads it: every key present, `null` where nothing is said. */
export type Job = z.output<typeof jobSchema>;
export type Limits = z.output<typeof limitsSchema>;
export type Source = Job['sources'][number];
export type Bus = Job['buses'][number];
export type Run = Job['runs'][number];
export type Transformer = Job['transformers'][number];
export type Load = Job['loads'][number];
export type Panel = Job['panels'][number];
export type ConductorRow = Job['conductorRows'][number];
