import type { JobFile } from '@farlug/solver/job';
import { jobFile, type LoadFile, ohmLoad, ohmRun, phasorSink, type RunFile } from './job-file.ts';
import { reference } from './reference.ts';

export interface SpiceRun {
  id: string;
  from: string;
  to: string;
  r_ohm: number;
  x_ohm: number;
}
interface SpiceLoad {
  id: string;
  type: 'current' | 'impedance';
  plus: string;
  minus: string;
  i_a: number;
  i_deg: number;
  r_ohm: number;
  x_ohm: number;
}
export interface SpiceReference {
  network: { runs: SpiceRun[]; loads: SpiceLoad[] };
  results: {
    node_voltages_ngspice: { node: string; re: number; im: number }[];
    run_currents: { id: string; i_mag: number; loss_w: number }[];
    total_run_loss_w: number;
  };
}

/** A network of `fixtures/reference/networks`, as a job, and where its nodes and runs are found in the solution. */
export interface SpiceCase {
  name: string;
  job: JobFile;
  /** ngspice node → bus and conductor. */
  nodes: Record<string, readonly [bus: string, conductor: 'L1' | 'L2' | 'L3' | 'N']>;
  /** ngspice run → run and conductor. */
  wires: Record<string, readonly [run: string, conductor: 'L1' | 'L2' | 'L3' | 'N']>;
}

type Wire = { r: number; x: number };
const open = (name: string) => {
  const { network } = reference<SpiceReference>(`networks/${name}`);
  const wire = (id: string): Wire => {
    const run = network.runs.find((each) => each.id === id)!;
    return { r: run.r_ohm, x: run.x_ohm };
  };
  const load = (
    id: string,
    bus: string,
    terminals: LoadFile['terminals'],
    nominalVolts: number,
    nominalDegrees: number,
  ): LoadFile => {
    const given = network.loads.find((each) => each.id === id)!;
    const size =
      given.type === 'current'
        ? phasorSink(given.i_a, turned(given.i_deg - nominalDegrees))
        : ohmLoad(given.r_ohm, given.x_ohm, nominalVolts);
    return { id, bus, terminals, ...size };
  };
  return { network, wire, load };
};
const turned = (degrees: number): number => ((degrees + 540) % 360) - 180;
const run = (
  id: string,
  from: string,
  to: string,
  conductors: RunFile['conductors'],
  line: Wire,
  neutral: Wire = line,
): RunFile => ohmRun(id, from, to, conductors, line.r, line.x, { neutral });

/** n1 and n2: one line and its neutral, buses numbered 0, 1, 2 … along the circuit. */
const twoWire = (name: string, count: number, volts: number): SpiceCase => {
  const { network, wire, load } = open(name);
  const nodes: SpiceCase['nodes'] = { L0: ['0', 'L1'] };
  const wires: SpiceCase['wires'] = {};
  const runs: RunFile[] = [];
  for (let k = 1; k <= count; k++) {
    nodes[`L${k}`] = [`${k}`, 'L1'];
    nodes[`N${k}`] = [`${k}`, 'N'];
    wires[`W${k}L`] = [`W${k}`, 'L1'];
    wires[`W${k}N`] = [`W${k}`, 'N'];
    runs.push(run(`W${k}`, `${k - 1}`, `${k}`, ['L1', 'N'], wire(`W${k}L`), wire(`W${k}N`)));
  }
  const job = jobFile({
    sources: [{ id: 'S1', bus: '0', system: '1ph-2w', volts }],
    runs,
    loads: network.loads.map((l) => load(l.id, l.plus.slice(1), 'L1-N', volts, 0)),
  });
  return { name, job, nodes, wires };
};

const ringFinal = (direct: boolean): SpiceCase => {
  const name = 'n3-ring-final';
  const { network, wire, load } = open(name);
  const nodes: SpiceCase['nodes'] = { L0: ['0', 'L1'] };
  const wires: SpiceCase['wires'] = { SPL: ['SP', 'L1'], SPN: ['SP', 'N'] };
  const runs = Array.from({ length: 9 }, (_, k) => {
    wires[`W${k + 1}L`] = [`W${k + 1}`, 'L1'];
    wires[`W${k + 1}N`] = [`W${k + 1}`, 'N'];
    nodes[`L${k + 1}`] = [`${k + 1}`, 'L1'];
    nodes[`N${k + 1}`] = [`${k + 1}`, 'N'];
    return run(`W${k + 1}`, `${k}`, `${(k + 1) % 9}`, ['L1', 'N'], wire(`W${k + 1}L`));
  });
  runs.push(run('SP', '4', '9', ['L1', 'N'], wire('SPL')));
  const job = jobFile({
    frequency: direct ? 0 : 50,
    sources: [{ id: 'S1', bus: '0', system: direct ? 'dc-2w' : '1ph-2w', volts: 230 }],
    runs,
    loads: network.loads.map((l) => load(l.id, l.plus.slice(1), 'L1-N', 230, 0)),
  });
  return { name, job, nodes, wires };
};

const splitPhase = (): SpiceCase => {
  const name = 'n4-split-phase';
  const { wire, load } = open(name);
  const job = jobFile({
    sources: [{ id: 'S', bus: '0', system: '1ph-3w', volts: 240, impedance: wire('SZ1') }],
    runs: [
      run('F', '0', '1', ['L1', 'L2', 'N'], wire('FA'), wire('FN')),
      run('M', '1', '2', ['L1', 'L2', 'N'], wire('MA'), wire('MN')),
      run('M2', '2', '3', ['L1', 'N'], wire('MA2'), wire('MN2')),
    ],
    loads: [
      load('H1', '1', 'L1-L2', 240, 0),
      load('H2', '1', 'L1-L2', 240, 0),
      load('L1', '1', 'L1-N', 120, 0),
      load('L2', '1', 'L2-N', 120, 180),
      load('M1', '2', 'L1-N', 120, 0),
      load('M2', '2', 'L2-N', 120, 180),
      load('M3', '3', 'L1-N', 120, 0),
    ],
  });
  const nodes: SpiceCase['nodes'] = { A0: ['0', 'L1'], B0: ['0', 'L2'], A3: ['3', 'L1'], N3: ['3', 'N'] };
  for (const bus of ['1', '2']) {
    nodes[`A${bus}`] = [bus, 'L1'];
    nodes[`B${bus}`] = [bus, 'L2'];
    nodes[`N${bus}`] = [bus, 'N'];
  }
  const wires: SpiceCase['wires'] = { MA2: ['M2', 'L1'], MN2: ['M2', 'N'] };
  for (const id of ['F', 'M']) {
    wires[`${id}A`] = [id, 'L1'];
    wires[`${id}B`] = [id, 'L2'];
    wires[`${id}N`] = [id, 'N'];
  }
  return { name, job, nodes, wires };
};

const deltaWye = (): SpiceCase => {
  const name = 'n6-delta-wye';
  const { wire, load } = open(name);
  const lineNeutral = 208 / Math.sqrt(3);
  const four: RunFile['conductors'] = ['L1', 'L2', 'L3', 'N'];
  const job = jobFile({
    sources: [{ id: 'S', bus: 'P0', system: '3ph-3w', volts: 480, impedance: wire('ZA') }],
    runs: [
      run('H', 'P0', 'P1', ['L1', 'L2', 'L3'], wire('HA')),
      run('G', '0', '1', four, wire('Ga'), wire('Gn')),
      run('K', '1', '2', four, wire('Ka'), wire('Kn')),
    ],
    transformers: [
      {
        id: 'T',
        from: 'P1',
        to: '0',
        kva: 75,
        primaryVolts: 480,
        secondaryVolts: 208,
        connection: 'delta-wye',
        percentZ: 4.5,
        xOverR: 1.8,
        system: '3ph-4w',
      },
    ],
    loads: [
      load('La', '1', 'L1-N', lineNeutral, -30),
      load('Lb', '1', 'L2-N', lineNeutral, -150),
      load('Lc', '1', 'L3-N', lineNeutral, 90),
      load('Lab', '1', 'L1-L2', 208, 0),
      load('La2', '2', 'L1-N', lineNeutral, -30),
      load('Lb2', '2', 'L2-N', lineNeutral, -150),
      load('Lc2', '2', 'L3-N', lineNeutral, 90),
      load('PM', 'P1', 'L1-L2', 480, 30),
    ],
  });
  const nodes: SpiceCase['nodes'] = {};
  const wires: SpiceCase['wires'] = { Gn: ['G', 'N'], Kn: ['K', 'N'] };
  (['L1', 'L2', 'L3'] as const).forEach((line, k) => {
    const letter = 'abc'[k]!;
    for (const bus of ['P0', 'P1']) nodes[`P${letter.toUpperCase()}${bus.slice(1)}`] = [bus, line];
    for (const bus of ['0', '1', '2']) nodes[`${letter}${bus}`] = [bus, line];
    wires[`H${letter.toUpperCase()}`] = ['H', line];
    wires[`G${letter}`] = ['G', line];
    wires[`K${letter}`] = ['K', line];
  });
  nodes.n1 = ['1', 'N'];
  nodes.n2 = ['2', 'N'];
  return { name, job, nodes, wires };
};

export const spiceCases: [title: string, one: SpiceCase][] = [
  ['two nodes', twoWire('n1-two-node', 1, 240)],
  ['several taps', twoWire('n2-multi-tap', 6, 120)],
  ['ring final circuit, direct current', ringFinal(true)],
  ['ring final circuit, 50 Hz', ringFinal(false)],
  ['split phase with a multiwire circuit', splitPhase()],
  ['delta-wye transformer', deltaWye()],
];
