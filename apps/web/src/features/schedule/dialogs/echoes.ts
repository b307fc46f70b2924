import type { LengthUnit } from '@farlug/solver/job';
import {
  formatSize,
  lengthIn,
  parseAmps,
  parseBreaker,
  parseConductorSize,
  parseLength,
  parseTemperature,
  parseVolts,
} from '@farlug/solver/units';

const short = (decimal: string): string => String(Math.round(Number(decimal) * 10) / 10);

/** What was understood of a typed field, where it says more than the text; null else. */
export type Echo = (text: string, lengthUnit: LengthUnit) => string | null;

/** `36m` in a job of feet is `= 118.1 ft`; in a job of metres it is `= 118.1 ft` too: always the other unit. */
export const echoLength: Echo = (text, unit) => {
  const read = text.trim() === '' ? null : parseLength(text, unit);
  if (!read?.ok) return null;
  const other = read.unit === unit ? (unit === 'ft' ? 'm' : 'ft') : unit;
  return `= ${short(lengthIn(read, other))} ${other}`;
};

export const echoSize: Echo = (text) => {
  const read = text.trim() === '' ? null : parseConductorSize(text);
  if (!read?.ok) return null;
  const said = [
    read.sets > 1 ? `${read.sets} sets of ${formatSize(read.size)}` : formatSize(read.size),
    read.material,
  ].filter(Boolean);
  return said.join(', ') === text.trim() ? null : `= ${said.join(', ')}`;
};

export const echoBreaker: Echo = (text) => {
  const read = text.trim() === '' ? null : parseBreaker(text, 3);
  return read?.ok ? `= ${read.amps} A, ${read.poles === 1 ? '1 pole' : `${read.poles} poles`}` : null;
};

export const echoTemperature: Echo = (text) => {
  const read = /f$/i.test(text.trim()) ? parseTemperature(text) : null;
  return read?.ok ? `= ${short(read.value)} °C` : null;
};

export const echoVolts: Echo = (text) => {
  const read = /kv$/i.test(text.trim()) ? parseVolts(text) : null;
  return read?.ok ? `= ${read.value} V` : null;
};

export const echoAmps: Echo = (text) => {
  const read = /ka$/i.test(text.trim()) ? parseAmps(text) : null;
  return read?.ok ? `= ${read.value} A` : null;
};
