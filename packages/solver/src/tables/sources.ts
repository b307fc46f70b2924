/** Where a table comes from: shown on the product's tables page and printed in every report. */
export interface TableSource {
  id: TableId;
  title: string;
  /** Standard, clause and edition. */
  source: string;
  /** How far the figures were seen, as the page says it. */
  verified: string;
  note: string | null;
}

export const TABLE_IDS = [
  'awg-dc',
  'awg-ac',
  'mm2-dc',
  'awg-ampacity',
  'awg-ambient',
  'awg-bundling',
  'mm2-ampacity',
  'mm2-ambient',
  'mm2-grouping',
  'small-conductors',
  'breakers',
  'grounding',
  'motors-1ph',
  'motors-3ph',
  'motors-locked',
  'code-letters',
] as const;
export type TableId = (typeof TABLE_IDS)[number];

const RETRIEVED = 'retrieved (secondary transcription)';
const PARTLY = 'retrieved in part (secondary transcription), the rest from memory';
const MEMORY = 'from memory';

const rows: Record<TableId, Omit<TableSource, 'id'>> = {
  'awg-dc': {
    title: 'Conductor areas and direct-current resistance, AWG and kcmil',
    source: 'NFPA 70 (NEC), Chapter 9 Table 8, 2008 through 2023',
    verified: PARTLY,
    note: 'Stranded, uncoated copper and aluminum, 75 °C. R2 = R1·[1 + α·(T2 − 75)], α 0.00323 Cu, 0.00330 Al.',
  },
  'awg-ac': {
    title: 'Alternating-current resistance and reactance, AWG and kcmil',
    source: 'NFPA 70 (NEC), Chapter 9 Table 9, 2008 through 2023',
    verified: PARTLY,
    note: 'Three single conductors in conduit, 60 Hz, 75 °C, ohm to neutral. Two significant digits below 3/0 AWG. Cable takes the PVC columns.',
  },
  'mm2-dc': {
    title: 'Direct-current resistance, mm²',
    source: 'IEC 60228:2004 and 2023, Table 2, class 2 stranded',
    verified: RETRIEVED,
    note: 'Largest resistance at 20 °C. α 0.00393 Cu, 0.00403 Al at 20 °C; skin effect by IEC 60287-1-1. Reactance 0.08 mΩ/m at 50 Hz, IEC 60364-5-52 Annex G.',
  },
  'awg-ampacity': {
    title: 'Ampacities, AWG and kcmil',
    source: 'NFPA 70 (NEC), Table 310.16 (2020, 2023); 310.15(B)(16) of 2011 to 2017',
    verified: PARTLY,
    note: 'Three current-carrying conductors, 30 °C ambient. The rating is limited by terminals, 110.14(C), and by 240.4(D).',
  },
  'awg-ambient': {
    title: 'Ambient correction, AWG and kcmil',
    source: 'NFPA 70 (NEC), Table 310.15(B)(1)(1) (2020, 2023); 310.15(B)(2)(a) of 2011 to 2017',
    verified: RETRIEVED,
    note: 'On the 30 °C ampacities.',
  },
  'awg-bundling': {
    title: 'More than three current-carrying conductors',
    source: 'NFPA 70 (NEC), Table 310.15(C)(1)',
    verified: MEMORY,
    note: 'Which neutrals count: 310.15(E).',
  },
  'mm2-ampacity': {
    title: 'Ampacities, mm²',
    source: 'IEC 60364-5-52:2009, Annex B, Tables B.52.2 to B.52.5',
    verified: PARTLY,
    note: 'Air 30 °C, ground 20 °C, soil 2.5 K·m/W. Methods A1, A2, B1, B2, C, D1, D2; no figures are held for E, F and G.',
  },
  'mm2-ambient': {
    title: 'Ambient correction, mm²',
    source: 'IEC 60364-5-52:2009, Tables B.52.14 (air) and B.52.15 (ground)',
    verified: 'air retrieved in part (secondary transcription), the rest from memory; ground from memory',
    note: null,
  },
  'mm2-grouping': {
    title: 'Grouping of circuits, mm²',
    source: 'IEC 60364-5-52:2009, Table B.52.17 item 1',
    verified: PARTLY,
    note: 'Bunched in air, on a surface, embedded or enclosed. Between listed numbers the next larger one serves.',
  },
  'small-conductors': {
    title: 'Largest overcurrent device for small conductors',
    source: 'NFPA 70 (NEC), 240.4(D)',
    verified: MEMORY,
    note: null,
  },
  breakers: {
    title: 'Standard ampere ratings of overcurrent devices',
    source: 'NFPA 70 (NEC), 240.6(A)',
    verified: MEMORY,
    note: '10 A since the 2023 edition.',
  },
  grounding: {
    title: 'Equipment grounding conductors',
    source: 'NFPA 70 (NEC), Table 250.122 (2017 and later), upsized by 250.122(B)',
    verified: RETRIEVED,
    note: 'Editions up to 2014 print larger sizes from 4000 A.',
  },
  'motors-1ph': {
    title: 'Full-load currents of single-phase motors',
    source: 'NFPA 70 (NEC), Table 430.248',
    verified: RETRIEVED,
    note: null,
  },
  'motors-3ph': {
    title: 'Full-load currents of three-phase induction motors',
    source: 'NFPA 70 (NEC), Table 430.250',
    verified: RETRIEVED,
    note: null,
  },
  'motors-locked': {
    title: 'Locked-rotor currents of motors',
    source: 'NFPA 70 (NEC), Tables 430.251(A) and 430.251(B)',
    verified: RETRIEVED,
    note: 'Made for disconnecting means and controllers; a nameplate code letter or the maker’s figure comes first.',
  },
  'code-letters': {
    title: 'Locked-rotor code letters',
    source: 'NFPA 70 (NEC), Table 430.7(B)',
    verified: RETRIEVED,
    note: 'kVA per horsepower with locked rotor.',
  },
};

/** Every table with its source, edition and how far it was seen, in a fixed order. */
export const tableSources = (): readonly TableSource[] => TABLE_IDS.map((id) => ({ id, ...rows[id] }));

export const tableSource = (id: TableId): TableSource => ({ id, ...rows[id] });
