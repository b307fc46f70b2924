/** One tuple per vocabulary: it feeds the job-file schema, the database checks and the pages. */

export const CONDUCTORS = ['L1', 'L2', 'L3', 'N'] as const;
export type Conductor = (typeof CONDUCTORS)[number];

/** Supply systems; phasors in `network`. Voltages are between lines, except `1ph-2w` and `dc-2w`. */
export const SYSTEMS = [
  'dc-2w',
  '1ph-2w',
  '1ph-3w',
  '1ph-3w-wye',
  '3ph-3w',
  '3ph-4w',
  '3ph-4w-delta',
] as const;
export type System = (typeof SYSTEMS)[number];

/** The conductors that a bus of each supply system has. */
export const SYSTEM_CONDUCTORS: Record<System, readonly Conductor[]> = {
  'dc-2w': ['L1', 'N'],
  '1ph-2w': ['L1', 'N'],
  '1ph-3w': ['L1', 'L2', 'N'],
  '1ph-3w-wye': ['L1', 'L2', 'N'],
  '3ph-3w': ['L1', 'L2', 'L3'],
  '3ph-4w': ['L1', 'L2', 'L3', 'N'],
  '3ph-4w-delta': ['L1', 'L2', 'L3', 'N'],
};

/** Terminal pairs in the order in which they are written and printed. */
export const PAIRS = ['L1-N', 'L2-N', 'L3-N', 'L1-L2', 'L2-L3', 'L1-L3'] as const;
export type Pair = (typeof PAIRS)[number];
export const TERMINALS = [...PAIRS, 'three-phase'] as const;
export type Terminals = (typeof TERMINALS)[number];

export const BASES = ['impedance', 'resistance'] as const;
export type Basis = (typeof BASES)[number];
export const ANGLES = ['nominal', 'local'] as const;
export type Angle = (typeof ANGLES)[number];
export const LENGTH_UNITS = ['ft', 'm'] as const;
export type LengthUnit = (typeof LENGTH_UNITS)[number];
export const FORCES = ['recommendation', 'mandatory'] as const;
export type Force = (typeof FORCES)[number];
export const BUS_KINDS = ['service', 'panel', 'junction', 'outlet', 'equipment'] as const;
export type BusKind = (typeof BUS_KINDS)[number];
export const RUN_KINDS = ['service', 'feeder', 'branch'] as const;
export type RunKind = (typeof RUN_KINDS)[number];
export const MATERIALS = ['copper', 'aluminum'] as const;
export type Material = (typeof MATERIALS)[number];
export const RACEWAYS = ['pvc', 'aluminum', 'steel', 'cable'] as const;
export type Raceway = (typeof RACEWAYS)[number];
/** Which rule protects a run's conductors; only `general` is checked (NEC 240.4). */
export const PROTECTIONS = ['general', 'motor', 'transformer', 'tap', 'dwelling-83'] as const;
export type Protection = (typeof PROTECTIONS)[number];
export const TRANSFORMER_CONNECTIONS = [
  'delta-wye',
  'wye-wye',
  'delta-delta',
  'wye-delta',
  'single-phase',
] as const;
export type TransformerConnection = (typeof TRANSFORMER_CONNECTIONS)[number];
export const BEHAVIOURS = ['current', 'power', 'impedance'] as const;
export type Behaviour = (typeof BEHAVIOURS)[number];
export const LOAD_CLASSES = [
  'lighting',
  'receptacle',
  'motor',
  'heat',
  'cooling',
  'kitchen',
  'sensitive',
  'emergency',
  'fire-pump',
  'ev',
  'generation',
  'equipment',
] as const;
export type LoadClass = (typeof LOAD_CLASSES)[number];
export const SCENARIOS = ['design', 'each-circuit', 'everything-on', 'light', 'starting'] as const;
export type Scenario = (typeof SCENARIOS)[number];
export const VERDICTS = ['within', 'over', 'rise', 'unserved', 'unjudged'] as const;
export type Verdict = (typeof VERDICTS)[number];
export const PANEL_LAYOUTS = ['two-column', 'sequential', 'three-phase-ways'] as const;
export type PanelLayout = (typeof PANEL_LAYOUTS)[number];
export const CIRCUIT_KINDS = ['branch', 'feeder', 'spare', 'reserved', 'feed-through'] as const;
export type CircuitKind = (typeof CIRCUIT_KINDS)[number];
/** Installation methods of IEC 60364-5-52 Table B.52.1. The tables hold no ampacities for E, F and G. */
export const INSTALLATION_METHODS = ['A1', 'A2', 'B1', 'B2', 'C', 'D1', 'D2', 'E', 'F', 'G'] as const;
export type InstallationMethod = (typeof INSTALLATION_METHODS)[number];
