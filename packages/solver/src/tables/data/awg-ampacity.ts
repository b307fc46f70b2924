/** [60 °C, 75 °C, 90 °C] columns in amperes; `null` where the table prints none. */
export type AmpacityColumns = readonly [c60: number | null, c75: number | null, c90: number | null];
export interface AwgAmpacityRow {
  size: string;
  copper: AmpacityColumns;
  aluminum: AmpacityColumns;
}

/**
 * NEC Table 310.16: not more than three current-carrying conductors in raceway, cable or earth, 30 °C ambient.
 * Source, edition and how far it was seen: `sources.ts`, `awg-ampacity`.
 */
export const AWG_AMPACITY: readonly AwgAmpacityRow[] = [
  { size: '18 AWG', copper: [null, null, 14], aluminum: [null, null, null] },
  { size: '16 AWG', copper: [null, null, 18], aluminum: [null, null, null] },
  { size: '14 AWG', copper: [15, 20, 25], aluminum: [null, null, null] },
  { size: '12 AWG', copper: [20, 25, 30], aluminum: [15, 20, 25] },
  { size: '10 AWG', copper: [30, 35, 40], aluminum: [25, 30, 35] },
  { size: '8 AWG', copper: [40, 50, 55], aluminum: [35, 40, 45] },
  { size: '6 AWG', copper: [55, 65, 75], aluminum: [40, 50, 55] },
  { size: '4 AWG', copper: [70, 85, 95], aluminum: [55, 65, 75] },
  { size: '3 AWG', copper: [85, 100, 115], aluminum: [65, 75, 85] },
  { size: '2 AWG', copper: [95, 115, 130], aluminum: [75, 90, 100] },
  { size: '1 AWG', copper: [110, 130, 145], aluminum: [85, 100, 115] },
  { size: '1/0 AWG', copper: [125, 150, 170], aluminum: [100, 120, 135] },
  { size: '2/0 AWG', copper: [145, 175, 195], aluminum: [115, 135, 150] },
  { size: '3/0 AWG', copper: [165, 200, 225], aluminum: [130, 155, 175] },
  { size: '4/0 AWG', copper: [195, 230, 260], aluminum: [150, 180, 205] },
  { size: '250 kcmil', copper: [215, 255, 290], aluminum: [170, 205, 230] },
  { size: '300 kcmil', copper: [240, 285, 320], aluminum: [195, 230, 260] },
  { size: '350 kcmil', copper: [260, 310, 350], aluminum: [210, 250, 280] },
  { size: '400 kcmil', copper: [280, 335, 380], aluminum: [225, 270, 305] },
  { size: '500 kcmil', copper: [320, 380, 430], aluminum: [260, 310, 350] },
  { size: '600 kcmil', copper: [350, 420, 475], aluminum: [285, 340, 385] },
  { size: '700 kcmil', copper: [385, 460, 520], aluminum: [315, 375, 425] },
  { size: '750 kcmil', copper: [400, 475, 535], aluminum: [320, 385, 435] },
  { size: '800 kcmil', copper: [410, 490, 555], aluminum: [330, 395, 445] },
  { size: '900 kcmil', copper: [435, 520, 585], aluminum: [355, 425, 480] },
  { size: '1000 kcmil', copper: [455, 545, 615], aluminum: [375, 445, 500] },
  { size: '1250 kcmil', copper: [495, 590, 665], aluminum: [405, 485, 545] },
  { size: '1500 kcmil', copper: [525, 625, 705], aluminum: [435, 520, 585] },
  { size: '1750 kcmil', copper: [545, 650, 735], aluminum: [455, 545, 615] },
  { size: '2000 kcmil', copper: [555, 665, 750], aluminum: [470, 560, 630] },
];
