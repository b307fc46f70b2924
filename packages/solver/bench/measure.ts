/** Median and spread of a repeated step, in milliseconds. */
export interface Timing {
  median: number;
  low: number;
  high: number;
}

const WARM_MS = 300;

/** `fresh` makes the input, outside the clock. The step runs until it is warm, then `times` times. */
export function measure<T>(fresh: () => T, step: (input: T) => unknown, times: number): Timing {
  const began = performance.now();
  for (let warm = 0; warm < 3 || performance.now() - began < WARM_MS; warm++) step(fresh());
  return timingOf(
    Array.from({ length: times }, () => {
      const input = fresh();
      const start = performance.now();
      step(input);
      return performance.now() - start;
    }),
  );
}

/** Median and 10 % … 90 % of what was taken. */
export function timingOf(taken: readonly number[]): Timing {
  const sorted = [...taken].sort((a, b) => a - b);
  const at = (share: number) => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))]!;
  return { median: at(0.5), low: at(0.1), high: at(0.9) };
}

export const digits = (ms: number): string => (ms < 0.0995 ? ms.toPrecision(2) : ms.toPrecision(3));

export const line = (what: string, { median, low, high }: Timing, note = ''): string =>
  `${what.padEnd(58)}${digits(median).padStart(9)} ms  ${`${digits(low)} … ${digits(high)}`.padEnd(20)} ${note}\n`;
