import { parseConductorSize, parseNumber } from '@farlug/solver/units';
import { Decimal } from 'decimal.js';
import type { JobRows, Row, WireUnit } from '../rows/index.ts';
import { materialFromText, racewayFromText } from './words.ts';

/** What typed text makes of the conductors of a run: the changes, or what would have been right. */
export type RunChange = { ok: true; set: Partial<Row<'run'>> } | { ok: false; message: string };
type SizeChange =
  | { ok: true; size: string | null; sets?: number; material?: Row<'run'>['material'] }
  | { ok: false; message: string };

/** A size as the job writes sizes: a bare number is mm² in a metric job. Firm's own sizes go by their name. */
export function readSize(rows: JobRows, wireUnit: WireUnit, text: string): SizeChange {
  if (text === '') return { ok: true, size: null };
  for (const own of rows.conductor.values())
    if (own.name === text) return { ok: true, size: own.name, material: own.material };
  const metric = wireUnit === 'mm2' && /^(\d+\s*[x×*]\s*)?\d+([.,]\d+)?$/.test(text);
  const read = parseConductorSize(metric ? `${text} mm2` : text);
  if (!read.ok) return read;
  return {
    ok: true,
    size: read.size,
    ...(read.sets > 1 ? { sets: read.sets } : {}),
    ...(read.material ? { material: read.material } : {}),
  };
}

/** A size, with sets and material where the text names them. A run's own ohms give way. */
export function sizeChange(rows: JobRows, wireUnit: WireUnit, text: string): RunChange {
  const read = readSize(rows, wireUnit, text);
  if (!read.ok) return read;
  const { ok: _, ...set } = read;
  return { ok: true, set: read.size === null ? { size: null } : { ...set, ...NO_OHMS } };
}

const NO_OHMS: Partial<Row<'run'>> = {
  ohmsR: null,
  ohmsX: null,
  ohmsPer: null,
  ohmsNeutralR: null,
  ohmsNeutralX: null,
};

/** `none`, `same`, or a size of its own. */
export function neutralChange(
  rows: JobRows,
  wireUnit: WireUnit,
  run: Pick<Row<'run'>, 'conductors'>,
  text: string,
): RunChange {
  const lines = run.conductors.filter((one) => one !== 'N');
  const word = text.toLowerCase();
  if (word === 'none' || word === 'no') {
    if (lines.length === 1)
      return { ok: false, message: 'must have a neutral: a single line needs its return' };
    return { ok: true, set: { conductors: lines, neutralSize: null } };
  }
  const conductors = [...lines, 'N' as const];
  if (word === 'same' || word === 'yes' || word === '')
    return { ok: true, set: { conductors, neutralSize: null } };
  const read = readSize(rows, wireUnit, text);
  return read.ok
    ? { ok: true, set: { conductors, neutralSize: read.size } }
    : { ok: false, message: `must be none, same, or a size: ${read.message}` };
}

export function groundChange(rows: JobRows, wireUnit: WireUnit, text: string): RunChange {
  const read = readSize(rows, wireUnit, text);
  return read.ok ? { ok: true, set: { groundingSize: read.size } } : read;
}

export function setsChange(text: string): RunChange {
  const sets = parseNumber(text === '' ? '1' : text, { min: 1, max: 50 });
  if (!sets.ok || !Number.isInteger(Number(sets.value)))
    return { ok: false, message: 'must be a whole number of parallel sets from 1 to 50' };
  return { ok: true, set: { sets: Number(sets.value) } };
}

export function materialChange(text: string): RunChange {
  const material = materialFromText(text);
  return material ? { ok: true, set: { material } } : { ok: false, message: 'must be copper or aluminum' };
}

/** What the raceway is made of, with its trade size before or after it; empty is not stated. */
export function racewayChange(text: string): RunChange {
  if (text === '') return { ok: true, set: { raceway: null, racewaySize: null } };
  const read = racewayFromText(text);
  if (!read) return { ok: false, message: 'must name pvc, aluminum, steel or cable, such as 3/4 EMT or PVC' };
  return { ok: true, set: { raceway: read.raceway, racewaySize: read.size } };
}

/** The share of what lies beyond a feeder that flows in it at one time: `0.8` or `80 %`; empty is all of it. */
export function feederDemandChange(text: string): RunChange {
  if (text === '') return { ok: true, set: { demand: null } };
  const read = readShare(text);
  return read.ok ? { ok: true, set: { demand: read.value === '1' ? null : read.value } } : read;
}

/** A share from 0 to 1, or as a percentage. */
export function readShare(text: string): { ok: true; value: string } | { ok: false; message: string } {
  const percent = /%$/.test(text);
  const read = parseNumber(text.replace(/\s*%$/, ''), { min: 0, max: percent ? 100 : 1 });
  if (!read.ok) return { ok: false, message: `must be a share such as 0.8 or 80 %: ${read.message}` };
  return percent ? { ok: true, value: new Decimal(read.value).div(100).toFixed() } : read;
}
