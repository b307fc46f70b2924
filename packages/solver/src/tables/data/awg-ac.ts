/** The three raceway columns, in the order of the table. */
export const AC_RACEWAYS = ['pvc', 'aluminum', 'steel'] as const;
/** [pvc, aluminum, steel], ohm to neutral per 1000 ft, 60 Hz, 75 °C; `null` where the table prints none. */
export type AcColumns = readonly [pvc: number, aluminum: number, steel: number];
export interface AwgAcRow {
  size: string;
  x: AcColumns;
  copper: AcColumns;
  aluminum: AcColumns | null;
}

/** NEC Chapter 9 Table 9: three single conductors in conduit. Source and edition: `sources.ts`, `awg-ac`. */
export const AWG_AC: readonly AwgAcRow[] = [
  { size: '14 AWG', x: [0.058, 0.058, 0.073], copper: [3.1, 3.1, 3.1], aluminum: null },
  { size: '12 AWG', x: [0.054, 0.054, 0.068], copper: [2, 2, 2], aluminum: [3.2, 3.2, 3.2] },
  { size: '10 AWG', x: [0.05, 0.05, 0.063], copper: [1.2, 1.2, 1.2], aluminum: [2, 2, 2] },
  { size: '8 AWG', x: [0.052, 0.052, 0.065], copper: [0.78, 0.78, 0.78], aluminum: [1.3, 1.3, 1.3] },
  { size: '6 AWG', x: [0.051, 0.051, 0.064], copper: [0.49, 0.49, 0.49], aluminum: [0.81, 0.81, 0.81] },
  { size: '4 AWG', x: [0.048, 0.048, 0.06], copper: [0.31, 0.31, 0.31], aluminum: [0.51, 0.51, 0.51] },
  { size: '3 AWG', x: [0.047, 0.047, 0.059], copper: [0.25, 0.25, 0.25], aluminum: [0.4, 0.41, 0.4] },
  { size: '2 AWG', x: [0.045, 0.045, 0.057], copper: [0.19, 0.2, 0.2], aluminum: [0.32, 0.32, 0.32] },
  { size: '1 AWG', x: [0.046, 0.046, 0.057], copper: [0.15, 0.16, 0.16], aluminum: [0.25, 0.26, 0.25] },
  { size: '1/0 AWG', x: [0.044, 0.044, 0.055], copper: [0.12, 0.13, 0.12], aluminum: [0.2, 0.21, 0.2] },
  { size: '2/0 AWG', x: [0.043, 0.043, 0.054], copper: [0.1, 0.1, 0.1], aluminum: [0.16, 0.16, 0.16] },
  { size: '3/0 AWG', x: [0.042, 0.042, 0.052], copper: [0.077, 0.082, 0.079], aluminum: [0.13, 0.13, 0.13] },
  { size: '4/0 AWG', x: [0.041, 0.041, 0.051], copper: [0.062, 0.067, 0.063], aluminum: [0.1, 0.11, 0.1] },
  {
    size: '250 kcmil',
    x: [0.041, 0.041, 0.052],
    copper: [0.052, 0.057, 0.054],
    aluminum: [0.085, 0.09, 0.086],
  },
  {
    size: '300 kcmil',
    x: [0.041, 0.041, 0.051],
    copper: [0.044, 0.049, 0.045],
    aluminum: [0.071, 0.076, 0.072],
  },
  {
    size: '350 kcmil',
    x: [0.04, 0.04, 0.05],
    copper: [0.038, 0.043, 0.039],
    aluminum: [0.061, 0.066, 0.063],
  },
  {
    size: '400 kcmil',
    x: [0.04, 0.04, 0.049],
    copper: [0.033, 0.038, 0.035],
    aluminum: [0.054, 0.059, 0.055],
  },
  {
    size: '500 kcmil',
    x: [0.039, 0.039, 0.048],
    copper: [0.027, 0.032, 0.029],
    aluminum: [0.043, 0.048, 0.045],
  },
  {
    size: '600 kcmil',
    x: [0.039, 0.039, 0.048],
    copper: [0.023, 0.028, 0.025],
    aluminum: [0.036, 0.041, 0.038],
  },
  {
    size: '750 kcmil',
    x: [0.038, 0.038, 0.048],
    copper: [0.019, 0.024, 0.021],
    aluminum: [0.029, 0.034, 0.031],
  },
  {
    size: '1000 kcmil',
    x: [0.037, 0.037, 0.046],
    copper: [0.015, 0.019, 0.018],
    aluminum: [0.023, 0.027, 0.025],
  },
];
