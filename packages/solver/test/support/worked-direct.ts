import { jobFile, ohmRun } from './job-file.ts';
import {
  direct,
  draws,
  type Example,
  groundRun,
  look,
  meter,
  pairRun,
  reads,
  resists,
  spreads,
} from './worked-examples.ts';

const GENERATION = 'light' as const;
const WEAK = 1e9;

/** The direct-current examples of fixtures/reference/worked-examples.json, as jobs. */
export const directExamples: Record<string, Example> = {
  'mehta-13.1': (solve) => {
    const stops = [
      ['C', 500, 100],
      ['D', 500, 150],
      ['E', 600, 200],
      ['B', 400, 50],
    ] as const;
    const runs = stops.map(([to, metres], k) => pairRun(to, stops[k - 1]?.[0] ?? 'A', to, metres * 0.02e-3));
    const s = look(
      solve(
        direct(
          [['A', 300]],
          runs,
          stops.map(([bus, , amps]) => draws(bus, amps)),
        ),
        'design',
      ),
    );
    return { V_C: s.volts('C'), V_D: s.volts('D'), V_E: s.volts('E'), V_B: s.volts('B') };
  },

  // The printed area drops exactly 10 V; the area wanted is in proportion to the drop of the printed one.
  'mehta-13.2': (solve) => {
    const printed = 1.164;
    const ohmsPerM = (2 * 1.78e-8) / (printed * 1e-4);
    const stops = [40, 100, 150, 250];
    const runs = stops.map((at, k) =>
      pairRun(`${at}`, `${stops[k - 1] ?? 0}`, `${at}`, (at - (stops[k - 1] ?? 0)) * ohmsPerM),
    );
    const loads = [30, 40, 100, 50].map((amps, k) => draws(`${stops[k]}`, amps));
    const s = look(solve(direct([['0', 250]], runs, loads), 'design'));
    return { area_cm2: (printed * s.load('250').dropVolts!) / 10 };
  },

  'mehta-13.3': (solve) => {
    const trolley = (id: string, from: string, to: string, km: number) =>
      ohmRun(id, from, to, ['L1', 'N'], 0.25 * km, 0, { neutral: { r: 0.03 * km } });
    const s = look(
      solve(
        direct(
          [['S', 600]],
          [trolley('1', 'S', 'a', 2), trolley('2', 'a', 'b', 4)],
          [draws('a', 40), draws('b', 20)],
        ),
        'design',
      ),
    );
    return { V_tram_A: s.volts('a'), V_tram_B: s.volts('b') };
  },

  'mehta-13.5': (solve) => {
    const runs = [pairRun('1', 'A', '150', 150 * 0.6e-3), pairRun('2', '150', '200', 50 * 0.6e-3)];
    const s = look(
      solve(
        direct([['A', 250]], runs, [spreads('1', 300), spreads('2', 100), reads('150'), reads('200')]),
        'design',
      ),
    );
    return { drop_150m: s.load('150').dropVolts!, drop_max: s.load('200').dropVolts! };
  },

  'mehta-13.6': (solve) => {
    const printed = 1.7;
    const ohms = (2 * 1.7e-6 * 500 * 100) / printed;
    const s = look(
      solve(direct([['A', 250]], [pairRun('1', 'A', 'B', ohms)], [spreads('1', 200), reads('B')]), 'design'),
    );
    return { area_cm2: (printed * s.load('B').dropVolts!) / 10 };
  },

  // The printed feeding voltage must leave exactly 250 V at the far end, and at the mid-point.
  'mehta-13.7': (solve) => {
    const runs = [pairRun('1', 'A', 'mid', 125 * 0.4e-3), pairRun('2', 'mid', 'far', 125 * 0.4e-3)];
    const loads = [spreads('1', 200), spreads('2', 200), reads('mid'), reads('far')];
    const at = (volts: number) => look(solve(direct([['A', volts]], runs, loads), 'design'));
    return {
      V_feed_far: 270 + (250 - at(270).volts('far')),
      V_feed_mid: 265 + (250 - at(265).volts('mid')),
    };
  },

  'mehta-13.10': (solve) => {
    const buses = ['A', 'C', 'D', 'E', 'F', 'B'];
    const metres = [100, 150, 150, 100, 100];
    const runs = metres.map((m, k) => pairRun(buses[k]!, buses[k]!, buses[k + 1]!, m * 0.34e-3));
    const loads = [draws('C', 20), draws('D', 40), draws('E', 50), draws('F', 30)];
    const s = look(
      solve(
        direct(
          [
            ['A', 220],
            ['B', 220],
          ],
          runs,
          loads,
        ),
        'design',
      ),
    );
    return { V_min_at_E: Math.min(...['C', 'D', 'E', 'F'].map((bus) => s.volts(bus))) };
  },

  // Both ends stand on the same return, so the ohms of both wires are taken in the line.
  'mehta-13.11': (solve) => {
    const buses = ['A', 'C', 'D', 'E', 'F', 'B'];
    const metres = [50, 25, 25, 50, 50];
    const runs = metres.map((m, k) =>
      groundRun(`I_${buses[k]}${buses[k + 1]}`, buses[k]!, buses[k + 1]!, m * 0.6e-3),
    );
    const loads = [draws('C', 25), draws('D', 50), draws('E', 30), draws('F', 40)];
    const s = look(
      solve(
        direct(
          [
            ['A', 230],
            ['B', 230, 235],
          ],
          runs,
          loads,
        ),
        'design',
      ),
    );
    return { ...Object.fromEntries(runs.map((run) => [run.id, s.flow(run.id)])), V_D: s.volts('D') };
  },

  'mehta-13.14': (solve) => {
    const runs = [pairRun('1', 'A', 'mid', 0.05), pairRun('2', 'mid', 'B', 0.05)];
    const s = look(
      solve(
        direct(
          [
            ['A', 220],
            ['B', 220],
          ],
          runs,
          [spreads('1', 250), spreads('2', 250), reads('mid')],
        ),
        'design',
      ),
    );
    return { drop_max: s.load('mid').dropVolts!, V_min: s.volts('mid') };
  },

  'mehta-13.15': (solve) => {
    const stops = [0, 299.95, 300, 300.05, 500];
    const runs = stops
      .slice(1)
      .map((to, k) => groundRun(`${to}`, `${stops[k]}`, `${to}`, (to - stops[k]!) * 0.2e-3));
    const loads = [
      ...stops.slice(1).map((to, k) => spreads(`${to}`, to - stops[k]!)),
      ...['299.95', '300', '300.05'].map(reads),
    ];
    const s = look(
      solve(
        direct(
          [
            ['A', 250, 255],
            ['B', 250],
          ],
          [...runs, meter('I_A', 'A', '0', ['L1', 'N']), meter('I_B', 'B', '500', ['L1', 'N'])],
          loads,
        ),
        'design',
      ),
    );
    const lowest = ['299.95', '300', '300.05'].reduce((low, at) => (s.volts(at) < s.volts(low) ? at : low));
    return { x: Number(lowest), V_min: s.volts('300'), I_A: s.amps('I_A'), I_B: s.amps('I_B') };
  },

  'mehta-13.19': (solve) => {
    const stops = [0, 200, 500, 800, 900];
    const runs = stops
      .slice(1)
      .map((to, k) => pairRun(`${to}`, `${stops[k]}`, `${to}`, (to - stops[k]!) * 1e-4));
    const loads = [
      ...stops.slice(1).map((to, k) => spreads(`${to}`, 0.5 * (to - stops[k]!))),
      draws('200', 50),
      draws('500', 100),
      draws('800', 150),
      reads('900'),
    ];
    const s = look(solve(direct([['0', 400]], runs, loads), 'design'));
    return { V_B: s.volts('900'), V_D: s.volts('500') };
  },

  'mehta-13.23': (solve) => {
    const ring = [
      ['I_AB', 'A', 'B', 0.1],
      ['I_BC', 'B', 'C', 0.05],
      ['I_DC', 'D', 'C', 0.01],
      ['I_ED', 'E', 'D', 0.025],
      ['I_AE', 'A', 'E', 0.075],
    ] as const;
    const s = look(
      solve(
        direct(
          [['A', 220]],
          ring.map(([id, from, to, ohms]) => pairRun(id, from, to, ohms)),
          [draws('B', 10), draws('C', 20), draws('D', 30), draws('E', 10)],
        ),
        'design',
      ),
    );
    return Object.fromEntries(ring.map(([id]) => [id, s.flow(id)]));
  },

  'mehta-13.24a': (solve) => {
    const s = look(
      solve(
        direct(
          [['A', 250]],
          [
            pairRun('1', 'A', 'B', 0.02),
            pairRun('2', 'B', 'C', 0.018),
            pairRun('3', 'C', 'D', 0.025),
            pairRun('4', 'D', 'A', 0.02),
          ],
          [draws('B', 150), draws('C', 300), draws('D', 250)],
        ),
        'design',
      ),
    );
    return { V_B: s.volts('B'), V_C: s.volts('C'), V_D: s.volts('D') };
  },

  'liec-dc-wire-area': (solve) => {
    const printed = 116_035;
    const ohms = (10.09 * 2300) / printed;
    const s = look(
      solve(direct([['A', 230]], [pairRun('1', 'A', 'B', 2 * ohms)], [draws('B', 25)]), 'design'),
    );
    return { area_cmil: (printed * s.load('B').dropVolts!) / 10 };
  },

  // Bolted at the far end: what the source sees is the driving-point impedance there.
  'liec-dc-14awg': (solve) => {
    const wire = (10.09 * 2300) / 4107;
    const s = look(
      solve(direct([['A', 230]], [pairRun('1', 'A', 'B', 2 * wire)], [draws('B', 1)]), 'design'),
    );
    const [loop] = s.load('B').thevenin!;
    return { R_one: loop / 2, R_two: loop, I_limit: 230 / loop };
  },

  // Copper at 20 °C and at 35 °C: the book's 0.004041 per kelvin and IEC's 0.00393 print the same digits.
  'liec-dc-temp': (solve) => {
    const at = (temperature: number) => {
      const job = direct(
        [['A', 14]],
        [
          {
            id: 'wire',
            kind: 'branch',
            from: 'A',
            to: 'B',
            length: 1000,
            conductors: ['L1', 'N'],
            size: 'lead',
            temperature,
          },
        ],
        [resists('B', 250, 14)],
      );
      job.conductorRows = [
        {
          name: 'lead',
          material: 'copper',
          areaMm2: 1,
          r: 15,
          per: 'km',
          temperature: 20,
          source: 'the book',
        },
      ];
      const s = look(solve(job, 'design'));
      return { load: s.volts('B'), wire: s.run('wire').dropVolts! / 2 };
    };
    return {
      V_load_20: at(20).load,
      V_wire_20: at(20).wire,
      V_load_35: at(35).load,
      V_wire_35: at(35).wire,
    };
  },

  'liec-dc-2src': (solve) => {
    const s = look(
      solve(
        direct(
          [
            ['1', 28],
            ['3', 28, 7],
          ],
          [groundRun('12', '1', '2', 4), groundRun('23', '2', '3', 1)],
          [resists('2', 2, 28)],
        ),
        'design',
      ),
    );
    return { V12: s.run('12').dropVolts!, V2: s.volts('2'), V23: s.run('23').dropVolts! };
  },

  // Current sources are generation, seen in the scenario that has them on; the job's source is too weak to matter.
  'liec-dc-node3': (solve) => {
    const job = direct(
      [['1', 24]],
      [groundRun('12', '1', '2', 150), groundRun('13', '1', '3', 50), groundRun('23', '2', '3', 100)],
      [draws('1', -0.136092), resists('2', 300, 24), resists('3', 250, 24)],
    );
    job.sources[0]!.impedance = { r: WEAK };
    const s = look(solve(job, GENERATION));
    return { E1: s.volts('1'), E2: s.volts('2'), E3: s.volts('3') };
  },

  'liec-dc-bridge10': (solve) => {
    const s = look(
      solve(
        direct(
          [['1', 10]],
          [groundRun('12', '1', '2', 12), groundRun('13', '1', '3', 18), groundRun('23', '2', '3', 6)],
          [resists('2', 18, 10), resists('3', 12, 10)],
        ),
        'design',
      ),
    );
    const drop = (id: string) => s.run(id).dropVolts!;
    return {
      V12: drop('12'),
      V13: drop('13'),
      V23: drop('23'),
      V2: s.volts('2'),
      V3: s.volts('3'),
    };
  },

  'sadiku-3.1': (solve) => {
    const job = direct(
      [['1', 20]],
      [groundRun('12', '1', '2', 4)],
      [
        draws('1', -5),
        draws('2', -5),
        { ...resists('1', 2, 20), id: 'R10' },
        { ...resists('2', 6, 20), id: 'R20' },
      ],
    );
    job.sources[0]!.impedance = { r: WEAK };
    const s = look(solve(job, GENERATION));
    return { v1: s.volts('1'), v2: s.volts('2') };
  },

  'nilsson-4.2': (solve) => {
    const s = look(
      solve(
        direct(
          [['s', 50]],
          [groundRun('5', 's', '1', 5)],
          [draws('1', -3), { ...resists('1', 10, 50), id: '10' }, { ...resists('1', 40, 50), id: '40' }],
        ),
        GENERATION,
      ),
    );
    const v1 = s.volts('1');
    return { v1, ia: s.flow('5'), ib: s.volts('10') / 10, ic: s.volts('40') / 40 };
  },

  'nilsson-fig4.7': (solve) => {
    const s = look(
      solve(
        direct(
          [['s', 10]],
          [groundRun('1', 's', '1', 1), groundRun('2', '1', '2', 2)],
          [draws('2', -2), { ...resists('1', 5, 10), id: '5' }, { ...resists('2', 10, 10), id: '10' }],
        ),
        GENERATION,
      ),
    );
    return { v1: s.volts('5'), v2: s.volts('2') };
  },

  // A three-wire direct-current supply has no system of its own; at power factor 1 the mid-point system is the same.
  'mehta-13.26': (solve) => {
    const s = look(
      solve(
        jobFile({
          sources: [{ id: 's', bus: 'A', system: '1ph-3w', volts: 500 }],
          runs: [ohmRun('1', 'A', 'B', ['L1', 'L2', 'N'], 0.1, 0, { neutral: { r: 0.2 } })],
          loads: [draws('B', 50), { ...draws('B', 40), id: 'negative', terminals: 'L2-N' }],
        }),
        'design',
      ),
    );
    return { V_positive: s.volts('B'), V_negative: s.volts('negative') };
  },

  // The broken middle wire is a neutral of a million megohms.
  'mehta-13.28': (solve) => {
    const s = look(
      solve(
        jobFile({
          sources: [{ id: 's', bus: 'A', system: '1ph-3w', volts: 500 }],
          runs: [ohmRun('1', 'A', 'B', ['L1', 'L2', 'N'], 1e-9, 0, { neutral: { r: WEAK }, length: 1e6 })],
          loads: [
            { id: 'p', bus: 'B', terminals: 'L1-N', kw: 35, behaviour: 'impedance' },
            { id: 'm', bus: 'B', terminals: 'L2-N', kw: 20, behaviour: 'impedance' },
          ],
        }),
        'design',
      ),
    );
    return { V_positive: s.volts('p'), V_negative: s.volts('m') };
  },
};
