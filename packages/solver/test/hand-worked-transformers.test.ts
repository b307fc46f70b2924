import type { JobFile, Solution } from '@farlug/solver/job';
import { describe, expect, it } from 'vitest';
import { jobFile, type LoadFile, ohmRun, type TransformerFile } from './support/job-file.ts';
import './support/ledger.ts';
import { SOLVERS } from './support/solvers.ts';

/**
 * One case per transformer connection, worked by hand. Every unit has 12 kVA per winding and 5 % with no reactance,
 * so that a 120 V winding has 0.05 · 120²/12000 = 0.06 Ω, a 240 V winding 0.24 Ω and each half of it 0.12 Ω.
 * The primary is fed by an ideal source through a run that only measures amps (10⁻⁷ Ω, so figures hold to 5·10⁻⁵).
 */
const ROOT3 = Math.sqrt(3);
const SMALL = 1e-7;

const fedBy = (
  system: JobFile['sources'][number]['system'],
  volts: number,
  transformer: Partial<TransformerFile>,
  loads: LoadFile[],
): JobFile =>
  jobFile({
    sources: [{ id: 's', bus: 'S', system, volts }],
    runs: [
      ohmRun('p', 'S', 'X', system === '3ph-3w' ? ['L1', 'L2', 'L3'] : ['L1', 'L2', 'L3', 'N'], SMALL, 0, {
        kind: 'feeder',
      }),
    ],
    transformers: [
      {
        id: 'T',
        from: 'X',
        to: 'Y',
        kva: 36,
        primaryVolts: volts,
        secondaryVolts: 240,
        connection: 'delta-wye',
        percentZ: 5,
        xOverR: 0,
        system: '3ph-4w',
        ...transformer,
      },
    ],
    loads,
  });

const load = (terminals: LoadFile['terminals'], amps: number): LoadFile => ({
  id: `${terminals}`,
  bus: 'Y',
  terminals,
  amps,
});
const near = (value: number | null | undefined, hand: number) =>
  expect((value ?? Number.NaN) - hand).toBeWithin(5e-5, 'figures worked by hand');
const phasor = (solution: Solution, conductor: 'L1' | 'L2' | 'L3' | 'N') => {
  const [re, im] = solution.buses.find((b) => b.id === 'Y')!.phasors![conductor]!;
  return { size: Math.hypot(re, im), degrees: (Math.atan2(im, re) * 180) / Math.PI };
};
const primaryAmps = (solution: Solution) => solution.runs[0]!.amps!;

describe.each(SOLVERS)('transformers worked by hand, by the %s solver', (_, solve) => {
  it('single-phase to two wires', () => {
    // 50 A through 0.06 Ω: 117 V. The ratio is 4, so 12.5 A on both primary lines.
    const solution = solve(
      fedBy(
        '3ph-3w',
        480,
        {
          connection: 'single-phase',
          primary: 'L2-L3',
          kva: 12,
          secondaryVolts: 120,
          system: '1ph-2w',
        },
        [load('L1-N', 50)],
      ),
      'design',
    );
    near(solution.loads[0]!.volts, 117);
    near(primaryAmps(solution).L1, 0);
    near(primaryAmps(solution).L2, 12.5);
    near(primaryAmps(solution).L3, 12.5);
    // The secondary stands in the direction of L2-L3 of the primary: −90°.
    near(phasor(solution, 'L1').degrees, -90);
  });

  it('single-phase to a mid-point secondary', () => {
    // 24 kVA: each half 12 kVA at 120 V, 0.06 Ω. 50 A on L1-N leaves L2-N alone; 50 A on L1-L2 drops in both halves.
    const unit: Partial<TransformerFile> = {
      connection: 'single-phase',
      primary: 'L1-L2',
      kva: 24,
      system: '1ph-3w',
    };
    const leg = solve(fedBy('3ph-3w', 480, unit, [load('L1-N', 50)]), 'design');
    near(leg.loads[0]!.volts, 117);
    near(leg.buses.find((b) => b.id === 'Y')!.volts!['L2-N'], 120);
    near(primaryAmps(leg).L1, 12.5);
    const lines = solve(fedBy('3ph-3w', 480, unit, [load('L1-L2', 50)]), 'design');
    near(lines.loads[0]!.volts, 240 - 6);
    near(primaryAmps(lines).L1, 25);
  });

  it('delta–wye: the lower side lags by 30°, a line load returns on two primary lines', () => {
    // 208 V class with 120 V windings: 50 A on L1-N drops 50 · 0.06 = 3 V, the other legs stand untouched.
    // Winding L1–L3 of the primary carries 50/4 = 12.5 A: out by L1, back by L3.
    const solution = solve(
      fedBy('3ph-3w', 480, { secondaryVolts: 120 * ROOT3 }, [load('L1-N', 50)]),
      'design',
    );
    near(solution.loads[0]!.volts, 117);
    near(phasor(solution, 'L1').degrees, -30);
    near(phasor(solution, 'L2').size, 120);
    near(phasor(solution, 'L2').degrees, -150);
    near(phasor(solution, 'L3').degrees, 90);
    near(primaryAmps(solution).L1, 12.5);
    near(primaryAmps(solution).L2, 0);
    near(primaryAmps(solution).L3, 12.5);
  });

  it('delta–wye stepping up: the higher side leads by 30°', () => {
    // 120 → 480√3 between lines: 480 V windings of 12 kVA, 0.05 · 480²/12000 = 0.96 Ω; 10 A drops 9.6 V.
    // The primary winding L1–L2 carries 4 · 10 = 40 A.
    const solution = solve(
      fedBy('3ph-3w', 120, { secondaryVolts: 480 * ROOT3 }, [load('L1-N', 10)]),
      'design',
    );
    near(solution.loads[0]!.volts, 480 - 9.6);
    near(phasor(solution, 'L1').degrees, 30);
    near(primaryAmps(solution).L1, 40);
    near(primaryAmps(solution).L2, 40);
    near(primaryAmps(solution).L3, 0);
  });

  it('wye–wye: no shift, a line load returns by the neutral', () => {
    // 480 V to 120 V windings, ratio 4.
    const solution = solve(
      fedBy('3ph-4w', 480 * ROOT3, { connection: 'wye-wye', secondaryVolts: 120 * ROOT3 }, [
        load('L2-N', 50),
      ]),
      'design',
    );
    near(solution.loads[0]!.volts, 117);
    near(phasor(solution, 'L2').degrees, -120);
    near(primaryAmps(solution).L1, 0);
    near(primaryAmps(solution).L2, 12.5);
    near(primaryAmps(solution).N, 12.5);
  });

  it('delta–delta: a load between two lines takes 2/3 from its own winding, 1/3 from the two others', () => {
    // 240 V windings of 0.24 Ω: 20 A in the first, drop 20 · 0.24 = 4.8 V. No current can circulate.
    // Primary lines of ratio 2: L1 takes i12 − i31 = (20 + 10)/2 = 15 A, L2 the same back, L3 nothing.
    const unit: Partial<TransformerFile> = { connection: 'delta-delta', system: '3ph-3w' };
    const solution = solve(fedBy('3ph-3w', 480, unit, [load('L1-L2', 30)]), 'design');
    near(solution.loads[0]!.volts, 240 - 4.8);
    near(primaryAmps(solution).L1, 15);
    near(primaryAmps(solution).L2, 15);
    near(primaryAmps(solution).L3, 0);
    // Balanced 50 A: each line sees 0.24/3 = 0.08 Ω, 4 V to the centroid, 4√3 V between lines.
    const motor = solve(fedBy('3ph-3w', 480, unit, [load('three-phase', 50)]), 'design');
    near(motor.loads[0]!.volts, 240 - 4 * ROOT3);
    // Referred to its centroid: three equal voltages at 0°, −120°, 120°.
    near(phasor(motor, 'L1').size, 240 / ROOT3 - 4);
    near(phasor(motor, 'L1').degrees, 0);
  });

  it('wye–delta: the star floats, the delta lags by 30°', () => {
    // The floating star forces the winding currents to add up to nothing: 20, −10 and −10 A again.
    // 480 V primary windings, ratio 2: 10, 5 and 5 A on the primary lines.
    const solution = solve(
      fedBy('3ph-3w', 480 * ROOT3, { connection: 'wye-delta', system: '3ph-3w' }, [load('L1-L2', 30)]),
      'design',
    );
    near(solution.loads[0]!.volts, 240 - 4.8);
    near(primaryAmps(solution).L1, 10);
    near(primaryAmps(solution).L2, 5);
    near(primaryAmps(solution).L3, 5);
    const idle = solve(
      fedBy('3ph-3w', 480 * ROOT3, { connection: 'wye-delta', system: '3ph-3w' }, [load('L1-L2', 0)]),
      'design',
    );
    near(phasor(idle, 'L1').degrees, -30);
  });

  it('wye–delta stepping up: the delta leads by 30°', () => {
    const solution = solve(
      fedBy('3ph-3w', 120, { connection: 'wye-delta', system: '3ph-3w' }, [load('three-phase', 50)]),
      'design',
    );
    near(solution.loads[0]!.volts, 240 - 4 * ROOT3);
    near(phasor(solution, 'L1').degrees, 30);
  });

  it.each(['delta-delta', 'wye-delta'] as const)('%s with a mid-point delta secondary', (connection) => {
    // 30 A on L1-N. Let k be the current in L1–L2, L2–L3 and L3–N; the half N–L1 then carries k − 30.
    // Round the delta nothing is left over: 0.24 k + 0.24 k + 0.12 k + 0.12 (k − 30) = 0, so k = 5.
    // The loaded half carries 25 A: 25 · 0.12 = 3 V.
    const solution = solve(
      fedBy(
        '3ph-3w',
        connection === 'delta-delta' ? 480 : 480 * ROOT3,
        { connection, system: '3ph-4w-delta' },
        [load('L1-N', 30), { ...load('L2-N', 0), id: 'high leg' }],
      ),
      'design',
    );
    near(solution.loads[0]!.volts, 117);
    // The high leg is nominally (√3/2)·240 V; the 5 A through L3–N and L2–L3 are in phase with L1-N, at right angles
    // to it: V(L2) = −j·207.85 + 0.12 · 5 + 0.24 · 5 turned into the frame of L1-N.
    near(solution.loads[1]!.volts, Math.hypot(120 * ROOT3, 0.12 * 5 + 0.24 * 5));
    near(phasor(solution, 'N').size, 0);
  });

  it('a tap raises the secondary and shows as less drop', () => {
    // +5 % on 120 V at no load: 126 V, a drop of −6 V.
    const solution = solve(
      fedBy('3ph-3w', 480, { secondaryVolts: 120 * ROOT3, tapPercent: 5 }, [load('L3-N', 0)]),
      'design',
    );
    near(solution.loads[0]!.volts, 126);
    near(solution.loads[0]!.dropPercent, -5);
    near(solution.loads[0]!.transformerPercent, -5);
  });

  it('the open voltage of the source carries over', () => {
    // 504 V where 480 are nominal: 126 V are the open voltage of the secondary, so nothing is dropped at no load.
    const job = fedBy('3ph-3w', 480, { secondaryVolts: 120 * ROOT3 }, [load('L3-N', 50)]);
    job.sources[0]!.openVolts = 504;
    const solution = solve(job, 'design');
    near(solution.loads[0]!.volts, 126 - 3);
    near(solution.loads[0]!.dropVolts, 3);
    near(solution.loads[0]!.dropPercent, 2.5);
  });
});
