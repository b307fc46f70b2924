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
export const EXAMPLE_PATH: readonly PathPoint[] = [
  { label: 'Service', kind: 'service', volts: 119.04 },
  { label: 'MDP', kind: 'panel', volts: 118.74, run: { size: '2 sets 350', length: '85 ft', weight: 6.8 } },
  {
    label: 'T1',
    kind: 'transformer',
    volts: 118.47,
    voltsBehind: 115.67,
    run: { size: '2/0 Cu', length: '60 ft', weight: 2.8 },
    says: '−2.80 V',
  },
  { label: 'DP-L', kind: 'panel', volts: 115.54, run: { size: '3/0 Cu', length: '12 ft', weight: 5 } },
  {
    label: 'LP-2',
    kind: 'panel',
    volts: 112.39,
    run: { size: '1/0 Cu, 119 A', length: '152 ft', weight: 3.2 },
    says: 'feeder −3.55 V',
  },
  {
    label: 'far lug',
    kind: 'far-lug',
    volts: 107.97,
    run: { size: '10 Cu, 16 A', length: '132 ft', weight: 1.6 },
    says: 'branch −4.51 V',
  },
];
export const EXAMPLE_VERDICT = 'over: 108.0 V, 6.71 %';
/** Behind each point: nominal less what is not counted, less 5 %. */
export const EXAMPLE_LIMIT: readonly { volts: number; voltsBehind?: number }[] = [
  { volts: 113.04 },
  { volts: 112.74 },
  { volts: 112.74, voltsBehind: 109.94 },
  { volts: 109.94 },
  { volts: 109.94 },
  { volts: 109.94 },
];
