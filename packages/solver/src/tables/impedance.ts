import type { ConductorRow } from '../job/schema.ts';
import type { Material, Raceway } from '../job/vocabulary.ts';
import { AC_RACEWAYS, AWG_AC } from './data/awg-ac.ts';
import { AWG_DC } from './data/awg-dc.ts';
import { MM2_DC } from './data/mm2-dc.ts';
import { parseSize, sizeNamed } from './size.ts';
import type { TableId } from './sources.ts';

export interface ImpedanceQuery {
  material: Material;
  /** A size as a job file writes it, or the name of a row in `conductorRows`. */
  size: string;
  raceway: Raceway;
  /** Hz; 0 is direct current. */
  frequencyHz: number;
  /** °C of the conductor; absent: 75 for AWG, 70 for mm², the row's own for a row of the firm. */
  temperatureC?: number | null;
  /** The firm's own sizes; a name found here comes before the tables. */
  conductorRows?: readonly ConductorRow[];
}

export interface ConductorImpedance {
  ok: true;
  /** Ohm per metre of one conductor at `atC` and the frequency asked for. */
  rOhmPerM: number;
  xOhmPerM: number;
  atC: number;
  /** Temperature coefficient per °C, and the temperature that it refers to. */
  alpha: number;
  alphaAtC: number;
  /** True where a direct-current figure serves at a frequency above 0, or the reactance is another size's. */
  estimated: boolean;
  /** The figures as the table prints them: what a hand check uses. */
  printed: { r: number; x: number; per: '1000ft' | 'km'; atC: number };
  source: TableId | 'conductor-row';
}
export type ImpedanceOutcome = ConductorImpedance | { ok: false; message: string };

export const M_PER_KFT = 304.8;
export const M_PER_KM = 1000;
const AWG_TABLE_C = 75;
const AWG_TABLE_HZ = 60;
const MM2_TABLE_C = 20;
const MM2_TABLE_HZ = 50;
/** Reactance of any mm² conductor, ohm per metre at 50 Hz (IEC 60364-5-52 Annex G). */
export const MM2_X_OHM_PER_M = 0.08e-3;
/** °C of a conductor where the run states none. */
export const DEFAULT_CONDUCTOR_C = { awg: 75, mm2: 70 } as const;

const ALPHA_20 = { copper: 0.00393, aluminum: 0.00403 } as const;
const ALPHA_75 = { copper: 0.00323, aluminum: 0.0033 } as const;

/**
 * Temperature coefficient of resistance per °C referred to `atC`: NEC Chapter 9 Table 8 at 75 °C,
 * IEC 60287-1-1 at 20 °C, elsewhere shifted from 20 °C by α20 / (1 + α20·(T − 20)).
 */
export function temperatureCoefficient(material: Material, atC: number): number {
  if (atC === AWG_TABLE_C) return ALPHA_75[material];
  const a20 = ALPHA_20[material];
  return a20 / (1 + a20 * (atC - 20));
}

/** Factor on a direct-current resistance for skin effect: 1 + ys, IEC 60287-1-1 clause 2.1, ks = 1, no proximity. */
export function skinFactor(dcOhmPerM: number, frequencyHz: number): number {
  if (frequencyHz === 0 || dcOhmPerM === 0) return 1;
  const xs2 = ((8 * Math.PI * frequencyHz) / dcOhmPerM) * 1e-7;
  const xs4 = xs2 * xs2;
  const xs = Math.sqrt(xs2);
  if (xs <= 2.8) return 1 + xs4 / (192 + 0.8 * xs4);
  if (xs <= 3.8) return 1 - 0.136 - 0.0177 * xs + 0.0563 * xs2;
  return 1 + 0.354 * xs - 0.733;
}

const dcAwg = new Map(AWG_DC.map((row) => [row.size, row]));
const acAwg = new Map(AWG_AC.map((row) => [row.size, row]));
const dcMm2 = new Map(MM2_DC.map((row) => [`${row.areaMm2} mm2`, row]));
const acAreas = AWG_AC.map((row) => ({ row, cmil: dcAwg.get(row.size)!.cmil }));

const nearestAc = (cmil: number) =>
  acAreas.reduce((best, next) => (Math.abs(next.cmil - cmil) < Math.abs(best.cmil - cmil) ? next : best)).row;

interface Figures {
  rOhmPerM: number;
  xOhmPerM: number;
  tableC: number;
  defaultC: number;
  /** The resistance is direct current: skin effect applies. */
  direct: boolean;
  estimated: boolean;
  printed: ConductorImpedance['printed'];
  source: ConductorImpedance['source'];
}

const awgFigures = (q: ImpedanceQuery, size: string, cmil: number): Figures => {
  const column = AC_RACEWAYS.indexOf(q.raceway === 'cable' ? 'pvc' : q.raceway);
  const alternating = q.frequencyHz > 0;
  const acRow = acAwg.get(size);
  const acR = alternating ? acRow?.[q.material]?.[column] : undefined;
  const r = acR ?? dcAwg.get(size)![q.material];
  const x = alternating ? (acRow ?? nearestAc(cmil)).x[column]! : 0;
  const direct = acR === undefined;
  return {
    rOhmPerM: r / M_PER_KFT,
    xOhmPerM: (x / M_PER_KFT) * (q.frequencyHz / AWG_TABLE_HZ),
    tableC: AWG_TABLE_C,
    defaultC: DEFAULT_CONDUCTOR_C.awg,
    direct,
    estimated: direct && alternating,
    printed: { r, x, per: '1000ft', atC: AWG_TABLE_C },
    source: direct ? 'awg-dc' : 'awg-ac',
  };
};

const mm2Figures = (q: ImpedanceQuery, size: string): Figures | null => {
  const r = dcMm2.get(size)![q.material];
  if (r === null) return null;
  const alternating = q.frequencyHz > 0;
  const x = alternating ? MM2_X_OHM_PER_M : 0;
  return {
    rOhmPerM: r / M_PER_KM,
    xOhmPerM: x * (q.frequencyHz / MM2_TABLE_HZ),
    tableC: MM2_TABLE_C,
    defaultC: DEFAULT_CONDUCTOR_C.mm2,
    direct: true,
    estimated: alternating,
    printed: { r, x: x * M_PER_KM, per: 'km', atC: MM2_TABLE_C },
    source: 'mm2-dc',
  };
};

const rowFigures = (q: ImpedanceQuery, row: ConductorRow): Figures => {
  const metres = row.per === 'km' ? M_PER_KM : M_PER_KFT;
  const x = q.frequencyHz > 0 ? row.x : 0;
  return {
    rOhmPerM: row.r / metres,
    xOhmPerM: x / metres,
    tableC: row.temperature,
    defaultC: row.temperature,
    direct: false,
    estimated: false,
    printed: { r: row.r, x, per: row.per, atC: row.temperature },
    source: 'conductor-row',
  };
};

/**
 * Ohm per metre of one conductor: NEC Chapter 9 Table 9 above 0 Hz, Table 8 at 0 Hz and where Table 9 lacks the
 * size, IEC 60228 class 2 for mm². A direct-current figure above 0 Hz takes the skin effect from its own
 * resistance at temperature; a size that Table 9 lacks takes the reactance of the nearest area there.
 * Resistance follows temperature, table reactance follows frequency. A row of the firm's own holds at the job's
 * frequency as it stands. Refused: a size that the tables lack for the material.
 */
export function conductorImpedance(q: ImpedanceQuery): ImpedanceOutcome {
  const own = q.conductorRows?.find((row) => row.name === q.size && row.material === q.material);
  const figures = own ? rowFigures(q, own) : tableFigures(q);
  if ('ok' in figures) return figures;
  const atC = q.temperatureC ?? figures.defaultC;
  const alpha = temperatureCoefficient(q.material, figures.tableC);
  const warm = figures.rOhmPerM * (1 + alpha * (atC - figures.tableC));
  return {
    ok: true,
    rOhmPerM: figures.direct ? warm * skinFactor(warm, q.frequencyHz) : warm,
    xOhmPerM: figures.xOhmPerM,
    atC,
    alpha,
    alphaAtC: figures.tableC,
    estimated: figures.estimated,
    printed: figures.printed,
    source: figures.source,
  };
}

const tableFigures = (q: ImpedanceQuery): Figures | { ok: false; message: string } => {
  const known = sizeNamed(q.size);
  const size = known ? { ok: true as const, ...known } : parseSize(q.size);
  if (!size.ok) return size;
  if (size.family === 'awg') return awgFigures(q, size.size, size.cmil);
  return (
    mm2Figures(q, size.size) ?? {
      ok: false,
      message: `must be a size in the tables; ${q.material} ${size.size} is not, aluminum starts at 10 mm2`,
    }
  );
};
