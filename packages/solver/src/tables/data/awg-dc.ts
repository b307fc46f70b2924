/** One stranded conductor of Table 8: area in circular mils, ohm per 1000 ft, direct current, 75 °C. */
export interface AwgDcRow {
  size: string;
  cmil: number;
  copper: number;
  aluminum: number;
}

/** NEC Chapter 9 Table 8: stranded, uncoated copper and aluminum. Source and edition: `sources.ts`, `awg-dc`. */
export const AWG_DC: readonly AwgDcRow[] = [
  { size: '18 AWG', cmil: 1620, copper: 7.95, aluminum: 13.1 },
  { size: '16 AWG', cmil: 2580, copper: 4.99, aluminum: 8.21 },
  { size: '14 AWG', cmil: 4110, copper: 3.14, aluminum: 5.17 },
  { size: '12 AWG', cmil: 6530, copper: 1.98, aluminum: 3.25 },
  { size: '10 AWG', cmil: 10380, copper: 1.24, aluminum: 2.04 },
  { size: '8 AWG', cmil: 16510, copper: 0.778, aluminum: 1.28 },
  { size: '6 AWG', cmil: 26240, copper: 0.491, aluminum: 0.808 },
  { size: '4 AWG', cmil: 41740, copper: 0.308, aluminum: 0.508 },
  { size: '3 AWG', cmil: 52620, copper: 0.245, aluminum: 0.403 },
  { size: '2 AWG', cmil: 66360, copper: 0.194, aluminum: 0.319 },
  { size: '1 AWG', cmil: 83690, copper: 0.154, aluminum: 0.253 },
  { size: '1/0 AWG', cmil: 105600, copper: 0.122, aluminum: 0.201 },
  { size: '2/0 AWG', cmil: 133100, copper: 0.0967, aluminum: 0.159 },
  { size: '3/0 AWG', cmil: 167800, copper: 0.0766, aluminum: 0.126 },
  { size: '4/0 AWG', cmil: 211600, copper: 0.0608, aluminum: 0.1 },
  { size: '250 kcmil', cmil: 250000, copper: 0.0515, aluminum: 0.0847 },
  { size: '300 kcmil', cmil: 300000, copper: 0.0429, aluminum: 0.0707 },
  { size: '350 kcmil', cmil: 350000, copper: 0.0367, aluminum: 0.0605 },
  { size: '400 kcmil', cmil: 400000, copper: 0.0321, aluminum: 0.0529 },
  { size: '500 kcmil', cmil: 500000, copper: 0.0258, aluminum: 0.0424 },
  { size: '600 kcmil', cmil: 600000, copper: 0.0214, aluminum: 0.0353 },
  { size: '700 kcmil', cmil: 700000, copper: 0.0184, aluminum: 0.0303 },
  { size: '750 kcmil', cmil: 750000, copper: 0.0171, aluminum: 0.0282 },
  { size: '800 kcmil', cmil: 800000, copper: 0.0161, aluminum: 0.0265 },
  { size: '900 kcmil', cmil: 900000, copper: 0.0143, aluminum: 0.0235 },
  { size: '1000 kcmil', cmil: 1000000, copper: 0.0129, aluminum: 0.0212 },
  { size: '1250 kcmil', cmil: 1250000, copper: 0.0103, aluminum: 0.0169 },
  { size: '1500 kcmil', cmil: 1500000, copper: 0.00858, aluminum: 0.0141 },
  { size: '1750 kcmil', cmil: 1750000, copper: 0.00735, aluminum: 0.0121 },
  { size: '2000 kcmil', cmil: 2000000, copper: 0.00643, aluminum: 0.0106 },
];
