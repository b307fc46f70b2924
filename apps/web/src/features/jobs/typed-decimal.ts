export type Typed = { ok: true; value: string | null } | { ok: false };

/** Powers of ten that a unit stands for, over the unit in which the value is kept. */
export type Units = Readonly<Record<string, number>>;

/** A typed number with or without its unit (`22 kA`, `0,004`, `1,200`), as a plain decimal; empty is `null`. */
export function typedDecimal(text: string, units: Units = {}): Typed {
  const trimmed = text.trim().replace(/[\u202f\u00a0]/g, ' ');
  if (trimmed === '') return { ok: true, value: null };
  const match = /^(-?[\d.,\s]*\d)\s*([^\d\s.,].*)?$/.exec(trimmed);
  if (!match) return { ok: false };
  const digits = plain(match[1]!);
  const unit = match[2]?.trim();
  const power = unit === undefined ? 0 : units[unit.toLowerCase()];
  if (digits === null || power === undefined) return { ok: false };
  return { ok: true, value: shifted(digits, power) };
}

/** Without thousands separators; a single comma before other than three digits is a decimal sign. */
function plain(text: string): string | null {
  const tight = text.replace(/\s/g, '');
  const digits = /^-?\d{1,3}(,\d{3})+(\.\d+)?$/.test(tight)
    ? tight.replace(/,/g, '')
    : tight.replace(/^(-?\d*),(\d+)$/, '$1.$2').replace(/^(-?)\./, '$10.');
  return /^-?\d{1,12}(\.\d{1,12})?$/.test(digits) ? digits : null;
}

function shifted(decimal: string, power: number): string {
  const sign = decimal.startsWith('-') ? '-' : '';
  const [whole = '0', part = ''] = decimal.replace('-', '').split('.');
  const moved = part.padEnd(power, '0');
  const left = (whole + moved.slice(0, power)).replace(/^0+(?=\d)/, '');
  const right = moved.slice(power).replace(/0+$/, '');
  return sign + (right === '' ? left : `${left}.${right}`);
}

export const VOLTS: Units = { v: 0, volt: 0, volts: 0, kv: 3 };
export const AMPS: Units = { a: 0, amp: 0, amps: 0, ka: 3 };
export const OHMS: Units = { ohm: 0, ohms: 0, ω: 0, Ω: 0 };
export const PERCENT: Units = { '%': 0, percent: 0 };
export const HERTZ: Units = { hz: 0 };
export const PLAIN: Units = {};
