/** NEC 240.6(A): standard ampere ratings; 10 A since 2023. `sources.ts`, `breakers`. */
export const STANDARD_AMPS: readonly number[] = [
  10, 15, 20, 25, 30, 35, 40, 45, 50, 60, 70, 80, 90, 100, 110, 125, 150, 175, 200, 225, 250, 300, 350, 400,
  450, 500, 600, 700, 800, 1000, 1200, 1600, 2000, 2500, 3000, 4000, 5000, 6000,
];

/** NEC 240.4(D): largest overcurrent device for small conductors, amperes. `sources.ts`, `small-conductors`. */
export const SMALL_CONDUCTOR_LIMITS: readonly {
  size: string;
  material: 'copper' | 'aluminum';
  amps: number;
}[] = [
  { size: '18 AWG', material: 'copper', amps: 7 },
  { size: '16 AWG', material: 'copper', amps: 10 },
  { size: '14 AWG', material: 'copper', amps: 15 },
  { size: '12 AWG', material: 'aluminum', amps: 15 },
  { size: '12 AWG', material: 'copper', amps: 20 },
  { size: '10 AWG', material: 'aluminum', amps: 25 },
  { size: '10 AWG', material: 'copper', amps: 30 },
];

/** NEC Table 250.122: equipment grounding conductor for a device of up to `amps`. `sources.ts`, `grounding`. */
export const GROUNDING: readonly { amps: number; copper: string; aluminum: string }[] = [
  { amps: 15, copper: '14 AWG', aluminum: '12 AWG' },
  { amps: 20, copper: '12 AWG', aluminum: '10 AWG' },
  { amps: 60, copper: '10 AWG', aluminum: '8 AWG' },
  { amps: 100, copper: '8 AWG', aluminum: '6 AWG' },
  { amps: 200, copper: '6 AWG', aluminum: '4 AWG' },
  { amps: 300, copper: '4 AWG', aluminum: '2 AWG' },
  { amps: 400, copper: '3 AWG', aluminum: '1 AWG' },
  { amps: 500, copper: '2 AWG', aluminum: '1/0 AWG' },
  { amps: 600, copper: '1 AWG', aluminum: '2/0 AWG' },
  { amps: 800, copper: '1/0 AWG', aluminum: '3/0 AWG' },
  { amps: 1000, copper: '2/0 AWG', aluminum: '4/0 AWG' },
  { amps: 1200, copper: '3/0 AWG', aluminum: '250 kcmil' },
  { amps: 1600, copper: '4/0 AWG', aluminum: '350 kcmil' },
  { amps: 2000, copper: '250 kcmil', aluminum: '400 kcmil' },
  { amps: 2500, copper: '350 kcmil', aluminum: '600 kcmil' },
  { amps: 3000, copper: '400 kcmil', aluminum: '600 kcmil' },
  { amps: 4000, copper: '500 kcmil', aluminum: '750 kcmil' },
  { amps: 5000, copper: '700 kcmil', aluminum: '1250 kcmil' },
  { amps: 6000, copper: '800 kcmil', aluminum: '1250 kcmil' },
];
