import type { LoadClass } from '@farlug/solver/job';

/** A starting value with its ground; the product shows both, and a person may set another. */
export interface StartingDefault {
  id: string;
  text: string;
  /** The clause that it follows, or `common practice`. */
  ground: string;
}

/** Where a person says nothing else. */
export const DEFAULTS: readonly StartingDefault[] = [
  {
    id: 'limits',
    text: '3 % for a branch circuit, 3 % for a feeder, 5 % in all. Ask which energy code is adopted: it may make a limit mandatory.',
    ground: 'NEC informational notes to 210.19 and 215.2: a recommendation, not a requirement (90.5(C))',
  },
  {
    id: 'receptacle-load',
    text: 'A receptacle circuit whose load is not known carries 80 % of its breaker at the last outlet.',
    ground: 'common practice',
  },
  {
    id: 'receptacle-upstream',
    text: 'Upstream, a receptacle counts 180 VA for each strap.',
    ground: 'NEC 220.14(I)',
  },
  {
    id: 'power-factor',
    text: 'Power factor 0.85 for motors and mixed loads, 0.95 for LED lighting, 1 for heat.',
    ground: 'common practice',
  },
  {
    id: 'temperature',
    text: 'Conductors at 75 °C; at 70 °C where sizes are in mm² (90 °C for thermosetting insulation).',
    ground: 'NEC Chapter 9 Table 8 and Table 9; IEC 60364-5-52 Table 52.1',
  },
  {
    id: 'terminals',
    text: 'Terminals rated 60 °C up to 100 A and 75 °C above, unless marked otherwise.',
    ground: 'NEC 110.14(C)',
  },
  {
    id: 'continuous',
    text: 'Continuous load counts 125 % for ampacity and breaker, and never for voltage drop.',
    ground: 'NEC 210.19, 210.20, 215.2, 215.3',
  },
  {
    id: 'length',
    text: 'Length: the right-angle route and its drops, 10 ft at the panel, 10 % on top, up to the next 5 ft.',
    ground: 'common practice',
  },
  {
    id: 'starting',
    text: 'Starting current by code letter, else six times full-load current, at power factor 0.35; limit 15 %.',
    ground: 'common practice; NEC 430.7(B) for code letters, 695.7 for fire pumps',
  },
  { id: 'rise', text: 'Voltage rise by generation: at most 2 %.', ground: 'common practice' },
  {
    id: 'lighting',
    text: 'The load of a lighting row is spread evenly along its run.',
    ground: 'common practice',
  },
];

export const STARTING_POWER_FACTOR = '0.35';
export const STARTING_TIMES_FULL_LOAD = 6;
export const RECEPTACLE_SHARE_OF_BREAKER = '0.8';
export const VA_PER_STRAP = 180;

const BY_CLASS: Partial<Record<LoadClass, string>> = { lighting: '0.95', heat: '1', generation: '1' };
/** Proposed by class of load, and marked as assumed wherever it counts. */
export const proposedPowerFactor = (ofClass: LoadClass): string => BY_CLASS[ofClass] ?? '0.85';
