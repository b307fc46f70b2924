import type { Row } from '../rows/index.ts';

/** Rows with nothing said in them; whoever makes one names what it must have. */
type Given<T, K extends keyof T> = Pick<T, K> & Partial<T>;
type JobRow = Row<'job'>;
type BusRow = Row<'bus'>;
type SourceRow = Row<'source'>;
type PanelRow = Row<'panel'>;
type CircuitRow = Row<'circuit'>;
type BreakerRow = Row<'breaker'>;
type RunRow = Row<'run'>;
type TransformerRow = Row<'transformer'>;
type LoadRow = Row<'load'>;

export const blankJob = (given: Given<JobRow, 'id' | 'name' | 'lengthUnit' | 'wireUnit'>): JobRow => ({
  address: null,
  building: null,
  area: null,
  codeEdition: null,
  authority: null,
  permitNumber: null,
  frequency: '60',
  basis: 'impedance',
  angle: 'nominal',
  limitPreset: null,
  limitBasis: null,
  limitForce: 'recommendation',
  includeService: false,
  includeTransformer: false,
  includeSource: false,
  longRun: false,
  ...given,
});

export const blankBus = (given: Given<BusRow, 'id' | 'code' | 'orderKey'>): BusRow => ({
  name: null,
  kind: 'junction',
  ...given,
});

export const blankSource = (
  given: Given<SourceRow, 'id' | 'code' | 'orderKey' | 'busId' | 'system'>,
): SourceRow => ({
  volts: null,
  openVolts: null,
  off: false,
  impedanceR: null,
  impedanceX: null,
  faultAmps: null,
  faultXOverR: null,
  ...given,
});

export const blankPanel = (given: Given<PanelRow, 'id' | 'busId' | 'spaces' | 'lines'>): PanelRow => ({
  building: null,
  area: null,
  layout: 'two-column',
  mainAmps: null,
  mounting: null,
  notes: null,
  ...given,
});

export const blankCircuit = (given: Given<CircuitRow, 'id' | 'orderKey' | 'panelId'>): CircuitRow => ({
  kind: 'branch',
  description: null,
  room: null,
  loadType: null,
  notes: null,
  ...given,
});

export const blankBreaker = (given: Given<BreakerRow, 'id' | 'circuitId' | 'space'>): BreakerRow => ({
  half: null,
  poles: 1,
  amps: null,
  ...given,
});

export const blankRun = (
  given: Given<RunRow, 'id' | 'code' | 'orderKey' | 'kind' | 'fromBusId' | 'toBusId' | 'conductors'>,
): RunRow => ({
  name: null,
  circuitId: null,
  length: null,
  lengthState: null,
  open: false,
  material: 'copper',
  size: null,
  neutralSize: null,
  sets: 1,
  raceway: null,
  racewaySize: null,
  temperature: null,
  temperatureOperating: false,
  ambient: null,
  insulation: null,
  terminals: null,
  bundled: null,
  method: null,
  groundingSize: null,
  protection: 'general',
  ohmsR: null,
  ohmsX: null,
  ohmsPer: null,
  ohmsNeutralR: null,
  ohmsNeutralX: null,
  demand: null,
  breakerAmps: null,
  breakerPoles: null,
  locked: false,
  floorOverride: null,
  notes: null,
  ...given,
});

export const blankTransformer = (
  given: Given<
    TransformerRow,
    'id' | 'code' | 'orderKey' | 'fromBusId' | 'toBusId' | 'connection' | 'system'
  >,
): TransformerRow => ({
  kva: null,
  primaryVolts: null,
  secondaryVolts: null,
  primary: 'three-phase',
  percentZ: null,
  xOverR: null,
  tapPercent: null,
  ...given,
});

export const blankLoad = (given: Given<LoadRow, 'id' | 'code' | 'orderKey' | 'terminals'>): LoadRow => ({
  circuitId: null,
  busId: null,
  alongRunId: null,
  name: null,
  size: null,
  sizeAssumed: false,
  powerFactor: null,
  powerFactorAssumed: false,
  leading: false,
  quantity: null,
  behaviour: 'current',
  demand: null,
  demandVa: null,
  minimum: null,
  continuous: false,
  class: 'equipment',
  ratedVolts: null,
  startingAmps: null,
  startingPowerFactor: null,
  ...given,
});
