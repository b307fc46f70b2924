/** A small seeded generator (mulberry32): the same seed gives the same job on every machine. */
export interface Random {
  /** Evenly in [low, high). */
  between: (low: number, high: number) => number;
  whole: (low: number, high: number) => number;
  chance: (probability: number) => boolean;
  pick: <T>(list: readonly T[]) => T;
}

export const randomFrom = (seed: number): Random => {
  let state = seed | 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const between = (low: number, high: number) => low + (high - low) * next();
  const whole = (low: number, high: number) => low + Math.floor(next() * (high - low + 1));
  return {
    between,
    whole,
    chance: (probability) => next() < probability,
    pick: (list) => list[whole(0, list.length - 1)]!,
  };
};
