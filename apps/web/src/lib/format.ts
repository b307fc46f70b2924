/** Figures, dates and sizes as they are shown: a space before %, times in the person’s zone. */

const SPACE = '\u00a0';

export function formatPercent(value: number | null | undefined, digits = 2): string {
  return value === null || value === undefined ? '' : `${value.toFixed(digits)}${SPACE}%`;
}

/** A percent without trailing zeros, as a limit is written: `3 %`, `1.5 %`. */
export function formatLimit(value: number | string): string {
  return `${Number(value)}${SPACE}%`;
}

export function formatNumber(value: number, digits = 0): string {
  return value.toLocaleString('en', { minimumFractionDigits: digits, maximumFractionDigits: digits });
}

export function formatCount(count: number, one: string, many = `${one}s`): string {
  return `${formatNumber(count)} ${count === 1 ? one : many}`;
}

const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });
const TIME = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

export function formatDay(instant: string): string {
  return DAY.format(new Date(instant));
}

export function formatTime(instant: string): string {
  return TIME.format(new Date(instant));
}

export function formatMoment(instant: string): string {
  return `${formatDay(instant)}, ${formatTime(instant)}`;
}

/** As near as helps: the time today, the day otherwise. */
export function formatRecent(instant: string, now: Date = new Date()): string {
  const then = new Date(instant);
  return then.toDateString() === now.toDateString() ? `today, ${formatTime(instant)}` : formatDay(instant);
}

export function formatBytes(bytes: number): string {
  if (bytes < 1024) return `${bytes} B`;
  if (bytes < 1024 * 1024) return `${formatNumber(bytes / 1024)} kB`;
  return `${formatNumber(bytes / 1024 / 1024, 1)} MB`;
}

/** The first eight digits of a revision’s hash, as printed. */
export function shortHash(sha256: string): string {
  return sha256.slice(0, 8);
}
