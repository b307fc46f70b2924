import type { LengthUnit } from '@farlug/solver/job';
import { parseLength, lengthIn as unitsLengthIn } from '@farlug/solver/units';
import { Decimal } from 'decimal.js';
import { lengthIn, splitQuantity } from '../job/index.ts';
import { isChain } from './circuit-form.ts';
import type { CircuitParts } from './circuit-parts.ts';

/**
 * Lengths of a row as they are typed: one length, or for a chain of segments the distances from the panel in
 * turn, `40, 62, 85 ft`. Other shapes show the length of the home run.
 */
export function cumulativeLength(parts: CircuitParts): string {
  const lengths = parts.runs.map((run) => run.length);
  if (lengths.length === 0) return '';
  if (lengths.length === 1 || !isChain(parts)) return lengths[0] ?? '';
  if (lengths.includes(null)) return '';
  const units = new Set(lengths.map((length) => splitQuantity(length!).unit));
  if (units.size > 1) return lengths.join(' + ');
  let sum = new Decimal(0);
  const distances = lengths.map((length) => {
    sum = sum.plus(splitQuantity(length!).number);
    return sum.toFixed();
  });
  return `${distances.join(', ')} ${[...units][0]}`;
}

export type LengthsOutcome = { ok: true; lengths: (string | null)[] } | { ok: false; message: string };

/** A length as rows keep it; millimetres, which they do not keep, as metres. */
export function readLength(
  text: string,
  unit: LengthUnit,
): { ok: true; length: string } | { ok: false; message: string } {
  const read = parseLength(text, unit);
  if (!read.ok) return read;
  return { ok: true, length: read.unit === 'mm' ? `${unitsLengthIn(read, 'm')} m` : read.text };
}

/**
 * The lengths of the segments from what was typed: one length for one segment; for a chain its distances from the
 * panel, or its segments joined by `+`. Other shapes take one length, that of the home run.
 */
export function readDistances(parts: CircuitParts, text: string, unit: LengthUnit): LengthsOutcome {
  const count = parts.runs.length;
  if (text === '') return { ok: true, lengths: parts.runs.map(() => null) };
  if (count === 1 || !isChain(parts)) {
    const one = readLength(text, unit);
    return one.ok
      ? { ok: true, lengths: [one.length, ...parts.runs.slice(1).map((run) => run.length)] }
      : one;
  }
  const segments = text.split(/\s*\+\s*/);
  const listed = segments.length > 1 ? segments : text.split(/\s*;\s*|,\s+/);
  if (listed.length !== count)
    return {
      ok: false,
      message: `must be ${count} distances from the panel, such as ${example(count, unit)}; this circuit has ${count} segments`,
    };
  const last = /([a-z'"]+)\.?$/i.exec(listed.at(-1)!)?.[1] ?? '';
  const read = listed.map((one) => readLength(/[a-z'"]$/i.test(one) ? one : `${one} ${last}`, unit));
  const wrong = read.find((one) => !one.ok);
  if (wrong) return wrong as LengthsOutcome;
  const lengths = read.map((one) => (one as { length: string }).length);
  return segments.length > 1 ? { ok: true, lengths } : differences(lengths, unit);
}

/** Distances from the panel as the lengths between them. */
function differences(distances: readonly string[], unit: LengthUnit): LengthsOutcome {
  const same = new Set(distances.map((one) => splitQuantity(one).unit)).size === 1;
  const target = same ? splitQuantity(distances[0]!).unit : unit;
  const values = distances.map((one) =>
    same ? new Decimal(splitQuantity(one).number) : new Decimal(lengthIn(one, unit)),
  );
  const steps = values.map((value, i) => (i === 0 ? value : value.minus(values[i - 1]!)));
  if (steps.some((step) => step.lt(0)))
    return { ok: false, message: 'must be distances that grow away from the panel' };
  return { ok: true, lengths: steps.map((step) => `${step.toDecimalPlaces(12).toFixed()} ${target}`) };
}

const example = (count: number, unit: LengthUnit): string =>
  `${Array.from({ length: count }, (_, i) => 40 + 25 * i).join(', ')} ${unit}`;
