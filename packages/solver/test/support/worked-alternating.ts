import type { JobFile } from '@farlug/solver/job';
import { jobFile, type LoadFile, ohmLoad, ohmRun, phasorSink, type RunFile } from './job-file.ts';
import { draws, type Example, look, meter, pairRun, reads } from './worked-examples.ts';

const ROOT3 = Math.sqrt(3);
const FOUR: RunFile['conductors'] = ['L1', 'L2', 'L3', 'N'];
const THREE: RunFile['conductors'] = ['L1', 'L2', 'L3'];

const splitPhase = (eachLeg: number, first: number, second: number): JobFile =>
  jobFile({
    sources: [{ id: 's', bus: 'A', system: '1ph-3w', volts: 2 * eachLeg }],
    runs: [ohmRun('1', 'A', 'B', ['L1', 'L2', 'N'], 0.1)],
    loads: [draws('B', first), { ...draws('B', second), id: 'b', terminals: 'L2-N' }],
  });

/** One three-phase run of `ohms` per line at power factor 1: √3·I·R between lines. */
const threePhase = (volts: number, ohms: number, amps: number): JobFile =>
  jobFile({
    sources: [{ id: 's', bus: 'A', system: '3ph-4w', volts }],
    runs: [ohmRun('1', 'A', 'B', FOUR, ohms)],
    loads: [
      { id: 'B', bus: 'B', terminals: 'three-phase', amps },
      { ...reads('B'), id: 'to neutral' },
    ],
  });

const impedance = (
  id: string,
  bus: string,
  terminals: LoadFile['terminals'],
  r: number,
  x: number,
  v: number,
) => ({
  id,
  bus,
  terminals,
  ...ohmLoad(r, x, v),
});

/** The alternating-current examples of fixtures/reference/worked-examples.json, as jobs. */
export const alternatingExamples: Record<string, Example> = {
  'jp2-2005-q6': (solve) => {
    const s = look(solve(splitPhase(104, 20, 10), 'design'));
    return { V_ab: s.volts('B'), V_bc: s.volts('b') };
  },
  'jp2-2018-q7': (solve) => ({ V_ab: look(solve(splitPhase(105, 10, 10), 'design')).volts('B') }),
  'jp2-2020-q7': (solve) => ({
    loss: look(solve(splitPhase(104, 20, 20), 'design')).run('1').lossWatts!,
  }),

  'jp2-2021-am-q6': (solve) => {
    const s = look(
      solve(
        jobFile({
          sources: [{ id: 's', bus: 'a', system: '1ph-2w', volts: 105 }],
          runs: [pairRun('1', 'a', 'b', 0.1), pairRun('2', 'b', 'c', 0.2), pairRun('3', 'c', 'd', 0.2)],
          loads: [draws('b', 10), draws('c', 5), draws('d', 5)],
        }),
        'design',
      ),
    );
    return { V_aa: s.busVolts('a'), V_bb: s.volts('b'), V_cc: s.volts('c'), V_dd: s.volts('d') };
  },
  'jp2-2021-1pm-q6': (solve) => {
    const s = look(
      solve(
        jobFile({
          sources: [{ id: 's', bus: 'a', system: '1ph-2w', volts: 102 }],
          runs: [pairRun('1', 'a', 'b', 0.1), pairRun('2', 'b', 'c', 0.2)],
          loads: [draws('b', 5), draws('c', 5)],
        }),
        'design',
      ),
    );
    return { drop_r1: s.run('1').dropVolts!, drop_r2: s.run('2').dropVolts!, V_cc: s.volts('c') };
  },

  'liec-ac-y208': (solve) => {
    const s = look(
      solve(
        jobFile({
          sources: [{ id: 's', bus: 'A', system: '3ph-4w', volts: 120 * ROOT3 }],
          runs: [meter('m', 'A', 'B', FOUR)],
          loads: [
            impedance('1', 'B', 'L1-N', 1.44, 0, 120),
            impedance('2', 'B', 'L2-N', 1.44, 0, 120),
            impedance('3', 'B', 'L3-N', 1.44, 0, 120),
            { ...reads('B'), id: 'lines', terminals: 'L1-L2' },
          ],
        }),
        'design',
      ),
    );
    return { V14: s.volts('1'), V12: s.volts('lines'), I: s.amps('m') };
  },

  // The star hangs on a neutral of a million megohms. The book's second phase leads: it is our L3.
  'liec-ac-seq': (solve) => {
    const capacitor = 1e6 / (2 * Math.PI * 60);
    const s = look(
      solve(
        jobFile({
          sources: [{ id: 's', bus: 'A', system: '3ph-4w', volts: 120 * ROOT3 }],
          runs: [ohmRun('m', 'A', 'B', FOUR, 1e-6, 0, { neutral: { r: 1e9 }, length: 1e6 })],
          loads: [
            impedance('1', 'B', 'L1-N', 2650, 0, 120),
            impedance('2', 'B', 'L3-N', 2650, 0, 120),
            impedance('3', 'B', 'L2-N', 1e-6, -capacitor, 120),
          ],
        }),
        'design',
      ),
    );
    return { V14: s.volts('1'), V24: s.volts('2'), V34: s.volts('3') };
  },

  // The printed area drops 14.4 V; the area wanted is in proportion to the drop of the printed one.
  'ecm-basics-2': (solve) => {
    const printed = 6207;
    const s = look(solve(threePhase(480, (12.9 * 200) / printed, 20), 'design'));
    return { cmil: (printed * s.load('B').dropVolts!) / 14.4 };
  },

  'cse-35mm2': (solve) => {
    const drop = (millivolts: number) =>
      look(solve(threePhase(400, (millivolts * 0.15) / ROOT3, 100), 'design')).load('B').dropVolts!;
    return { drop: drop(1.1), mV_required: (0.7 * 10.5) / drop(0.7) };
  },

  'nech-t9-1': (solve) => {
    const s = look(solve(threePhase(240, 0.16 * 0.15, 100), 'design'));
    return {
      VD_LN: s.load('to neutral').dropVolts!,
      VD_LL: s.load('B').dropVolts!,
      V_load: s.volts('B'),
    };
  },

  'nech-210.19': (solve) => ({
    drop: look(solve(tableRun('6 AWG', 240, 50), 'design')).load('B').dropVolts!,
  }),
  'holt-12awg': (solve) => ({
    drop: look(solve(tableRun('12 AWG', 120, 16), 'design')).load('B').dropVolts!,
  }),
  'holt-1al': (solve) => ({
    drop: look(solve(threePhase(208, (21.2 * 80) / 83_690, 100), 'design')).load('B').dropVolts!,
  }),

  // The tabulated volts per ampere stand for R cos φ + X sin φ: taken as ohms at power factor 1.
  'eig-1': (solve) => {
    const job = (voltsPerAmpKm: number): JobFile =>
      jobFile({
        sources: [{ id: 's', bus: 'A', system: '3ph-3w', volts: 400, impedance: { r: 0 } }],
        runs: [
          ohmRun('board', 'A', 'B', THREE, 10 / (ROOT3 * 1000), 0, { kind: 'feeder' }),
          ohmRun('cable', 'B', 'M', THREE, (voltsPerAmpKm * 0.05) / ROOT3),
        ],
        loads: [
          { id: 'other', bus: 'B', terminals: 'three-phase', amps: 900 },
          {
            id: 'motor',
            bus: 'M',
            terminals: 'three-phase',
            amps: 100,
            starting: { amps: 500, powerFactor: 1 },
          },
        ],
      });
    const running = look(solve(job(1), 'design'));
    const starting = look(solve(job(0.52), 'starting'));
    const motor = starting.load('motor');
    return {
      dU_cable: running.run('cable').dropVolts!,
      dU_total_percent: running.load('motor').dropPercent!,
      dU_start_cable: (motor.branchPercent! / 100) * 400,
      dU_board_start: (motor.feederPercent! / 100) * 400,
      dU_start_percent: motor.startingPercent!,
    };
  },

  // Sequence a c b: the book's b stands at +120°, which is our L3.
  'sadiku-12.9': (solve) => {
    const s = look(
      solve(
        jobFile({
          sources: [{ id: 's', bus: 'A', system: '3ph-4w', volts: 100 * ROOT3 }],
          runs: [meter('m', 'A', 'B', FOUR)],
          loads: [
            impedance('a', 'B', 'L1-N', 15, 0, 100),
            impedance('b', 'B', 'L3-N', 10, 5, 100),
            impedance('c', 'B', 'L2-N', 6, -8, 100),
          ],
        }),
        'design',
      ),
    );
    const [re, im] = s.phasor('B', 'N');
    return {
      Ia: s.amps('m', 'L1'),
      Ib: s.amps('m', 'L3'),
      Ic: s.amps('m', 'L2'),
      In: s.amps('m', 'N'),
      // The neutral's volts are in phase with what returns by it; the book counts it the other way.
      In_deg: (Math.atan2(-im, -re) * 180) / Math.PI,
    };
  },

  // The book refers all currents to one phasor, which is our nominal angle, and prints the size of the phasor drop.
  'mehta-14.1': (solve) => {
    const pair = (id: string, from: string, to: string, r: number, x: number) =>
      ohmRun(id, from, to, ['L1', 'N'], r / 2, x / 2);
    const s = look(
      solve(
        jobFile({
          frequency: 50,
          sources: [{ id: 's', bus: 'A', system: '1ph-2w', volts: 230 }],
          runs: [pair('1', 'A', 'C', 0.04, 0.02), pair('2', 'C', 'B', 0.02, 0.01)],
          loads: [
            { ...draws('C', 0), ...phasorSink(Math.hypot(70.7, 70.7), -45) },
            { ...draws('B', 0), amps: 200, powerFactor: 0.8 },
          ],
        }),
        'design',
      ),
    );
    const [line, neutral] = [s.phasor('B', 'L1'), s.phasor('B', 'N')];
    return { drop: Math.hypot(230 - (line[0] - neutral[0]), line[1] - neutral[1]) };
  },

  'ieee141-tables': (solve) => {
    const s = look(solve(threePhase(480, (0.85 / 1e4 / ROOT3) * 500, 300), 'design'));
    return { VD_LL: s.load('B').dropVolts!, VD_LN: s.load('to neutral').dropVolts! };
  },

  // 0.9 · 3.5 % at the terminals of a unit on a stiff supply; the bolted current is |E|/|Z| there.
  'shortcircuit-1500kva': (solve) => {
    const s = look(
      solve(
        jobFile({
          sources: [{ id: 's', bus: 'A', system: '3ph-3w', volts: 13_800 }],
          runs: [meter('m', 'B', 'C', FOUR)],
          transformers: [
            {
              id: 'T',
              from: 'A',
              to: 'B',
              kva: 1500,
              primaryVolts: 13_800,
              secondaryVolts: 480,
              connection: 'delta-wye',
              percentZ: 0.9 * 3.5,
              xOverR: 6,
              system: '3ph-4w',
            },
          ],
          loads: [{ id: 'full', bus: 'C', terminals: 'three-phase', va: 1_500_000 }],
        }),
        'design',
      ),
    );
    return { I_FLA: s.amps('m'), I_SC: 480 / ROOT3 / Math.hypot(...s.load('full').thevenin!) };
  },
};

/** 100 ft of a table size in a PVC raceway, two wires, resistance only. */
const tableRun = (size: string, volts: number, amps: number): JobFile => ({
  ...jobFile({
    sources: [{ id: 's', bus: 'A', system: '1ph-2w', volts }],
    runs: [{ id: '1', kind: 'branch', from: 'A', to: 'B', length: 100, conductors: ['L1', 'N'], size }],
    loads: [draws('B', amps)],
  }),
  basis: 'resistance',
  lengthUnit: 'ft',
});
