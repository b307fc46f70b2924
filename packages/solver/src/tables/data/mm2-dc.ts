/** One class 2 conductor: ohm per km, direct current, 20 °C; `null` where the standard gives none. */
export interface Mm2DcRow {
  areaMm2: number;
  copper: number;
  aluminum: number | null;
}

/** IEC 60228 Table 2, class 2 stranded: plain copper and aluminium. Source and edition: `sources.ts`, `mm2-dc`. */
export const MM2_DC: readonly Mm2DcRow[] = [
  { areaMm2: 0.5, copper: 36, aluminum: null },
  { areaMm2: 0.75, copper: 24.5, aluminum: null },
  { areaMm2: 1, copper: 18.1, aluminum: null },
  { areaMm2: 1.5, copper: 12.1, aluminum: null },
  { areaMm2: 2.5, copper: 7.41, aluminum: null },
  { areaMm2: 4, copper: 4.61, aluminum: null },
  { areaMm2: 6, copper: 3.08, aluminum: null },
  { areaMm2: 10, copper: 1.83, aluminum: 3.08 },
  { areaMm2: 16, copper: 1.15, aluminum: 1.91 },
  { areaMm2: 25, copper: 0.727, aluminum: 1.2 },
  { areaMm2: 35, copper: 0.524, aluminum: 0.868 },
  { areaMm2: 50, copper: 0.387, aluminum: 0.641 },
  { areaMm2: 70, copper: 0.268, aluminum: 0.443 },
  { areaMm2: 95, copper: 0.193, aluminum: 0.32 },
  { areaMm2: 120, copper: 0.153, aluminum: 0.253 },
  { areaMm2: 150, copper: 0.124, aluminum: 0.206 },
  { areaMm2: 185, copper: 0.0991, aluminum: 0.164 },
  { areaMm2: 240, copper: 0.0754, aluminum: 0.125 },
  { areaMm2: 300, copper: 0.0601, aluminum: 0.1 },
  { areaMm2: 400, copper: 0.047, aluminum: 0.0778 },
  { areaMm2: 500, copper: 0.0366, aluminum: 0.0605 },
  { areaMm2: 630, copper: 0.0283, aluminum: 0.0469 },
  { areaMm2: 800, copper: 0.0221, aluminum: 0.0367 },
  { areaMm2: 1000, copper: 0.0176, aluminum: 0.0291 },
];
