// A campus of invented buildings as a job file: medium-voltage feeders, a transformer in each building, panels with
// single circuits, circuits of three taps, multiwire circuits and motors.
import { randomFrom } from '../test/support/random.ts';

const PER_PANEL = 40;
const PANELS_PER_BUILDING = 10;
const LINES = ['L1', 'L2', 'L3'] as const;

interface Parts {
  buses: object[];
  runs: object[];
  transformers: object[];
  loads: object[];
}

export function bigJob(circuits: number, seed = 7): object {
  const { between, whole } = randomFrom(seed);
  const parts: Parts = { buses: [], runs: [], transformers: [], loads: [] };
  const branch = (id: string, from: string, to: string, conductors: readonly string[], feet: number) =>
    parts.runs.push({
      id,
      kind: 'branch',
      from,
      to,
      conductors,
      length: feet,
      size: '12 AWG',
      raceway: 'steel',
    });

  const tapped = (id: string, panel: string, line: string) => {
    let at = panel;
    for (let tap = 1; tap <= 3; tap++) {
      branch(`${id}.${tap}`, at, `${id}-${tap}`, [line, 'N'], tap === 1 ? between(30, 80) : between(6, 20));
      at = `${id}-${tap}`;
      parts.loads.push({
        id: `${id}.${tap}`,
        bus: at,
        terminals: `${line}-N`,
        va: 180 * whole(1, 3),
        powerFactor: 0.95,
        class: 'receptacle',
      });
    }
  };
  const multiwire = (id: string, panel: string, line: number) => {
    const pair = [LINES[line]!, LINES[(line + 1) % 3]!];
    branch(id, panel, `${id}-e`, [...pair, 'N'].sort(), between(30, 90));
    for (const [k, name] of pair.entries())
      parts.loads.push({
        id: `${id}${'ab'[k]}`,
        bus: `${id}-e`,
        terminals: `${name}-N`,
        amps: between(3, 10),
        powerFactor: 0.9,
        class: 'receptacle',
      });
  };
  const motor = (id: string, panel: string) => {
    branch(id, panel, `${id}-e`, LINES, between(30, 120));
    parts.loads.push({
      id,
      bus: `${id}-e`,
      terminals: 'three-phase',
      amps: between(3, 9),
      powerFactor: 0.82,
      class: 'motor',
      starting: { amps: 45, powerFactor: 0.4 },
    });
  };
  const single = (id: string, panel: string, line: string) => {
    branch(id, panel, `${id}-e`, [line, 'N'], between(30, 110));
    parts.loads.push({
      id,
      bus: `${id}-e`,
      terminals: `${line}-N`,
      amps: between(2, 9),
      powerFactor: 0.95,
      demand: 0.8,
      class: 'lighting',
    });
  };

  for (let c = 0; c < circuits; c++) {
    const panel = `P${Math.floor(c / PER_PANEL)}`;
    const building = `B${Math.floor(c / PER_PANEL / PANELS_PER_BUILDING)}`;
    if (c % (PER_PANEL * PANELS_PER_BUILDING) === 0) {
      parts.runs.push({
        id: `M-${building}`,
        kind: 'feeder',
        from: 'yard',
        to: `${building}-h`,
        conductors: LINES,
        length: between(300, 2000),
        ohms: { r: 0.08, x: 0.05, per: '1000ft' },
      });
      parts.transformers.push({
        id: `T-${building}`,
        from: `${building}-h`,
        to: building,
        kva: 750,
        primaryVolts: 12_470,
        secondaryVolts: 208,
        connection: 'delta-wye',
        primary: 'three-phase',
        percentZ: 5.5,
        xOverR: 5,
        tapPercent: 2.5,
        system: '3ph-4w',
      });
    }
    if (c % PER_PANEL === 0) {
      parts.runs.push({
        id: `F-${panel}`,
        kind: 'feeder',
        from: building,
        to: panel,
        conductors: [...LINES, 'N'],
        length: between(40, 220),
        size: '350 kcmil',
        sets: 2,
        raceway: 'steel',
      });
      parts.buses.push({ id: panel, kind: 'panel' });
    }
    const id = `${panel}-${c % PER_PANEL}`;
    if (c % 8 === 7) motor(id, panel);
    else if (c % 8 === 3) multiwire(id, panel, c % 3);
    else if (c % 4 === 1) tapped(id, panel, LINES[c % 3]!);
    else single(id, panel, LINES[c % 3]!);
  }
  return {
    format: 'farlug-job/1',
    name: `A campus of ${circuits} circuits`,
    lengthUnit: 'ft',
    limits: { feeder: 3, branch: 3, total: 5, includeTransformer: true, starting: 15 },
    sources: [
      { id: 'utility', bus: 'yard', system: '3ph-3w', volts: 12_470, fault: { amps: 8000, xOverR: 8 } },
    ],
    ...parts,
  };
}
