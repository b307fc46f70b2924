/** NEC Table 310.15(B)(1)(1): factor by ambient up to `maxC`, for the 60, 75 and 90 °C columns. `sources.ts`, `awg-ambient`. */
export const AWG_AMBIENT: readonly {
  maxC: number;
  factors: readonly [c60: number | null, c75: number | null, c90: number | null];
}[] = [
  { maxC: 10, factors: [1.29, 1.2, 1.15] },
  { maxC: 15, factors: [1.22, 1.15, 1.12] },
  { maxC: 20, factors: [1.15, 1.11, 1.08] },
  { maxC: 25, factors: [1.08, 1.05, 1.04] },
  { maxC: 30, factors: [1, 1, 1] },
  { maxC: 35, factors: [0.91, 0.94, 0.96] },
  { maxC: 40, factors: [0.82, 0.88, 0.91] },
  { maxC: 45, factors: [0.71, 0.82, 0.87] },
  { maxC: 50, factors: [0.58, 0.75, 0.82] },
  { maxC: 55, factors: [0.41, 0.67, 0.76] },
  { maxC: 60, factors: [null, 0.58, 0.71] },
  { maxC: 65, factors: [null, 0.47, 0.65] },
  { maxC: 70, factors: [null, 0.33, 0.58] },
  { maxC: 75, factors: [null, null, 0.5] },
  { maxC: 80, factors: [null, null, 0.41] },
  { maxC: 85, factors: [null, null, 0.29] },
];

/** NEC Table 310.15(C)(1): factor for up to `max` current-carrying conductors (`null`: any more). `sources.ts`, `awg-bundling`. */
export const AWG_BUNDLING: readonly { max: number | null; factor: number }[] = [
  { max: 3, factor: 1 },
  { max: 6, factor: 0.8 },
  { max: 9, factor: 0.7 },
  { max: 20, factor: 0.5 },
  { max: 30, factor: 0.45 },
  { max: 40, factor: 0.4 },
  { max: null, factor: 0.35 },
];
