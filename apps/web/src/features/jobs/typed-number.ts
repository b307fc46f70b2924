import {
  parseAmps,
  parseNumber,
  parsePercent,
  parseQuantity,
  parseVolts,
  type UnitSet,
} from '@farlug/solver/units';

/** Reads a typed number with or without its unit. */
export type Reader = (text: string) => { ok: true; value: string } | { ok: false; message: string };

const MOST = 1e9;
const OHMS: UnitSet<'ohm'> = {
  what: 'ohms',
  examples: '0.004',
  spellings: { ohm: 'ohm', ohms: 'ohm', ω: 'ohm' },
};
const HERTZ: UnitSet<'Hz'> = { what: 'a frequency', examples: '60 Hz', spellings: { hz: 'Hz' } };

export const readVolts: Reader = (text) => parseVolts(text, { min: 0, above: true, max: 1e6 });
export const readAmps: Reader = (text) => parseAmps(text);
export const readPercent: Reader = (text) => parsePercent(text);
export const readShare: Reader = (text) => parsePercent(text, { min: 0, max: 200 });
export const readOhms: Reader = (text) => parseQuantity(text, OHMS, 'ohm', { min: 0, max: MOST });
export const readHertz: Reader = (text) =>
  parseQuantity(text, HERTZ, 'Hz', { min: 0, above: true, max: 1000 });
export const readRatio: Reader = (text) => parseNumber(text, { min: 0, max: MOST });

/** The decimal that a row keeps; `null` where nothing, or nothing that is understood, was typed. */
export function decimalOrNull(text: string, read: Reader): string | null {
  if (text.trim() === '') return null;
  const outcome = read(text);
  return outcome.ok ? outcome.value : null;
}
