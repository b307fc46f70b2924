/** The worst path of the demo job, each circuit full in turn: what the figure of the front page draws. */
export interface PathPoint {
  label: string;
  kind: 'service' | 'panel' | 'transformer' | 'far-lug';
  /** Volts on a 120 V base; a transformer has those before and behind it. */
  volts: number;
  voltsBehind?: number;
  /** The run that leads here from the point before. */
  run?: { size: string; length: string; weight: number };
  /** The drop counted against the limit on the way here, said beside the line. */
  says?: string;
}

export const EXAMPLE_JOB = 'Tannery Row workshop';
const EXAMPLE_LOAD = 'LP-2-20';
export const EXAMPLE_PATH: readonly PathPoint[] = [
  { label: 'Service', kind: 'service', volts: 118.67 },
  { label: 'MDP', kind: 'panel', volts: 118.25, run: { size: '2 sets 350', length: '85 ft', weight: 6.8 } },
  {
    label: 'T1',
    kind: 'transformer',
    volts: 117.92,
    voltsBehind: 114.85,
    run: { size: '2/0 Cu', length: '60 ft', weight: 2.8 },
    says: '−3.08 V',
  },
  { label: 'DP-L', kind: 'panel', volts: 114.7, run: { size: '500 Cu', length: '12 ft', weight: 5 } },
  {
    label: 'LP-2',
    kind: 'panel',
    volts: 111.56,
    run: { size: '1/0 Cu, 132 A', length: '152 ft', weight: 3.2 },
    says: 'feeder −3.61 V',
  },
  {
    label: 'far lug',
    kind: 'far-lug',
    volts: 107.03,
    run: { size: '10 Cu, 16 A', length: '132 ft', weight: 1.6 },
    says: 'branch −4.53 V',
  },
];
/** At the lug itself, and of feeder and branch. */
export const EXAMPLE_VOLTS = 107.1;
export const EXAMPLE_PERCENT = 6.79;
export const EXAMPLE_VERDICT = `over: ${EXAMPLE_VOLTS.toFixed(1)} V, ${EXAMPLE_PERCENT.toFixed(2)} %`;
/** At each point: what is left of 120 V after what the limit does not count, less 5 %. */
export const EXAMPLE_LIMIT: readonly { volts: number; voltsBehind?: number }[] = [
  { volts: 112.67 },
  { volts: 112.25 },
  { volts: 112.25, voltsBehind: 109.17 },
  { volts: 109.17 },
  { volts: 109.17 },
  { volts: 109.17 },
];
