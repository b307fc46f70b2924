/** Median and spread of a repeated step, in milliseconds. `fresh` makes its input, outside the clock. */
export function measure<T>(
  fresh: () => T,
  step: (input: T) => unknown,
  times: number,
): { median: number; low: number; high: number } {
  for (let warm = 0; warm < Math.min(times, 5); warm++) step(fresh());
  const taken = Array.from({ length: times }, () => {
    const input = fresh();
    const began = performance.now();
    step(input);
    return performance.now() - began;
  }).sort((a, b) => a - b);
  const at = (share: number) => taken[Math.min(taken.length - 1, Math.floor(share * taken.length))]!;
  return { median: at(0.5), low: at(0.1), high: at(0.9) };
}

export const line = (what: string, { median, low, high }: ReturnType<typeof measure>, note = ''): string =>
  `${what.padEnd(52)}${median.toFixed(2).padStart(10)} ms   ${low.toFixed(2)} … ${high.toFixed(2)}   ${note}\n`;
