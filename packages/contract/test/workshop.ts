import { type JobFile, jobSchema } from '@farlug/solver/job';
import { rowsFromJob } from '../src/job/index.ts';
import { type JobRows, rowsFromLists } from '../src/rows/index.ts';

const feeder = {
  conductors: ['L1', 'L2', 'L3', 'N'] as const,
  raceway: 'steel' as const,
  material: 'copper' as const,
};
const branch = {
  kind: 'branch' as const,
  size: '12 AWG',
  raceway: 'steel' as const,
  breaker: { amps: 20, poles: 1 as const },
};

/** A small shop with every form of a schedule row: a main panel, a transformer, and panel LP-1 behind it. */
export const WORKSHOP: JobFile = {
  format: 'farlug-job/1',
  name: 'Workshop',
  lengthUnit: 'ft',
  limits: { feeder: 3, branch: 3, total: 5 },
  sources: [
    { id: 'utility', bus: 'service', system: '3ph-4w', volts: 480, fault: { amps: 22000, xOverR: 4 } },
  ],
  buses: [
    { id: 'MDP', kind: 'panel', name: 'Main' },
    { id: 'LP-1', kind: 'panel', name: 'Shop floor' },
  ],
  runs: [
    {
      id: 'S1',
      kind: 'service',
      from: 'service',
      to: 'MDP',
      length: 60,
      size: '350 kcmil',
      sets: 2,
      ...feeder,
      conductors: [...feeder.conductors],
    },
    {
      id: 'F1',
      kind: 'feeder',
      from: 'MDP',
      to: 'T1-pri',
      length: 40,
      size: '3 AWG',
      ...feeder,
      conductors: ['L1', 'L2', 'L3'],
      breaker: { amps: 100, poles: 3 },
    },
    {
      id: 'F2',
      kind: 'feeder',
      from: 'T1-sec',
      to: 'LP-1',
      length: 20,
      size: '3/0 AWG',
      ...feeder,
      conductors: [...feeder.conductors],
    },
    { id: 'LP-1-1', from: 'LP-1', to: 'LP-1-1-end', length: 85, conductors: ['L1', 'N'], ...branch },
    {
      id: 'LP-1-2/4',
      from: 'LP-1',
      to: 'LP-1-2/4-end',
      length: 90,
      conductors: ['L1', 'L2', 'N'],
      ...branch,
    },
    { id: 'LP-1-7', from: 'LP-1', to: 'LP-1-7-a', length: 50, conductors: ['L1', 'N'], ...branch },
    { id: 'LP-1-7.2', from: 'LP-1-7-a', to: 'LP-1-7-b', length: 35, conductors: ['L1', 'N'], ...branch },
    { id: 'LP-1-9', from: 'LP-1', to: 'LP-1-9-end', length: 70, conductors: ['L2', 'N'], ...branch },
    { id: 'LP-1-13', from: 'LP-1', to: 'LP-1-13-a', length: 40, conductors: ['L1', 'N'], ...branch },
    { id: 'LP-1-13.2', from: 'LP-1-13-a', to: 'LP-1-13-b', length: 45, conductors: ['L1', 'N'], ...branch },
    { id: 'LP-1-13.3', from: 'LP-1-13-b', to: 'LP-1', length: 50, conductors: ['L1', 'N'], ...branch },
    {
      id: 'LP-1-15/17/19',
      from: 'LP-1',
      to: 'LP-1-15/17/19-end',
      length: 60,
      conductors: ['L1', 'L2', 'L3'],
      ...branch,
      breaker: { amps: 30, poles: 3 },
      size: '10 AWG',
    },
  ],
  transformers: [
    {
      id: 'T1',
      from: 'T1-pri',
      to: 'T1-sec',
      kva: 75,
      primaryVolts: 480,
      secondaryVolts: 208,
      connection: 'delta-wye',
      percentZ: 5,
      xOverR: 2,
      system: '3ph-4w',
    },
  ],
  loads: [
    { id: 'LP-1-1', bus: 'LP-1-1-end', terminals: 'L1-N', amps: 12, powerFactor: 0.9, class: 'receptacle' },
    { id: 'LP-1-2/4a', bus: 'LP-1-2/4-end', terminals: 'L1-N', amps: 11, powerFactor: 0.9 },
    { id: 'LP-1-2/4b', bus: 'LP-1-2/4-end', terminals: 'L2-N', amps: 8, powerFactor: 0.9 },
    { id: 'LP-1-7a', bus: 'LP-1-7-a', terminals: 'L1-N', amps: 5, powerFactor: 0.9 },
    { id: 'LP-1-7b', bus: 'LP-1-7-b', terminals: 'L1-N', amps: 6, powerFactor: 0.9 },
    { id: 'LP-1-9', along: 'LP-1-9', terminals: 'L2-N', amps: 9, powerFactor: 0.95, class: 'lighting' },
    { id: 'LP-1-13a', bus: 'LP-1-13-a', terminals: 'L1-N', amps: 5, powerFactor: 0.9 },
    { id: 'LP-1-13b', bus: 'LP-1-13-b', terminals: 'L1-N', amps: 6, powerFactor: 0.9 },
    {
      id: 'LP-1-15/17/19',
      bus: 'LP-1-15/17/19-end',
      terminals: 'three-phase',
      amps: 16.7,
      powerFactor: 0.85,
      class: 'motor',
      starting: { amps: 100, powerFactor: 0.35 },
    },
  ],
  panels: [
    {
      bus: 'MDP',
      spaces: 30,
      lines: ['L1', 'L2', 'L3'],
      mainAmps: 400,
      circuits: [{ spaces: [1, 3, 5], run: 'F1', kind: 'feeder', description: 'Shop floor' }],
    },
    {
      bus: 'LP-1',
      spaces: 42,
      lines: ['L1', 'L2', 'L3'],
      mainAmps: 225,
      circuits: [
        { spaces: [1], run: 'LP-1-1', description: 'Bench receptacles' },
        { spaces: [2, 4], run: 'LP-1-2/4', description: 'Shared neutral' },
        { spaces: [7], run: 'LP-1-7', description: 'Two taps' },
        { spaces: [9], run: 'LP-1-9', description: 'Lighting' },
        { spaces: [13], run: 'LP-1-13', description: 'Ring' },
        { spaces: [15, 17, 19], run: 'LP-1-15/17/19', description: 'Saw' },
        { spaces: [41], kind: 'spare', description: 'Spare' },
      ],
    },
  ],
};

export const workshop = (): JobRows => rowsFromLists(rowsFromJob(jobSchema.parse(WORKSHOP)));
