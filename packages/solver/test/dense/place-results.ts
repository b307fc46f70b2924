import type { BusResult, Job, LoadResult, RunResult, Verdict } from '@farlug/solver/job';
import { carries, worstOf } from './carried.ts';
import { abs } from './complex.ts';
import { D, NIL } from './decimal.ts';
import { exceeds } from './limits.ts';
import { phasor } from './load-results.ts';
import type { ServedLoad } from './sinks.ts';
import type { Solved } from './solve.ts';
import { exceedsPercent, livePairs, readPair, SAME_PERCENT, splitOf } from './split.ts';
import { nodeOf, type Topology } from './topology.ts';

export const busResult = (
  job: Job,
  topology: Topology,
  shown: Solved,
  design: Solved,
  bus: string,
): BusResult => {
  const isPanel =
    job.buses.some((b) => b.id === bus && b.kind === 'panel') || job.panels.some((p) => p.bus === bus);
  const limit = job.limits.feeder;
  const lit = topology.conductors.get(bus)!.filter((c) => topology.live.has(nodeOf(bus, c)));
  if (lit.length === 0) {
    const dead: BusResult = { id: bus, volts: null, phasors: null };
    return isPanel ? { ...dead, feederPercent: null, verdict: 'unserved' } : dead;
  }
  const pairs = livePairs(topology, bus);
  const volts: NonNullable<BusResult['volts']> = {};
  for (const ends of pairs)
    volts[`${ends[0]}-${ends[1]}` as 'L1-N'] = readPair(topology, shown.voltage, bus, ends).volts.toNumber();
  if (lit.includes('N')) volts.N = abs(shown.voltage(nodeOf(bus, 'N'))).toNumber();
  const phasors: NonNullable<BusResult['phasors']> = {};
  for (const c of lit) phasors[c] = phasor(shown.voltage(nodeOf(bus, c)));
  if (!isPanel) return { id: bus, volts, phasors };
  const worst = pairs
    .map((ends) => readPair(topology, design.voltage, bus, ends))
    .reduce((top, reading) => (exceedsPercent(reading, top) ? reading : top));
  const { feeder } = splitOf(job, topology, design.voltage, worst, [bus]);
  const verdict: Verdict = limit === null ? 'unjudged' : exceeds(feeder, D(limit)) ? 'over' : 'within';
  return { id: bus, volts, phasors, feederPercent: feeder.toNumber(), verdict };
};

export const runResults = (
  job: Job,
  topology: Topology,
  loads: ServedLoad[],
  shown: Solved,
  results: LoadResult[],
): RunResult[] =>
  job.runs.map((run): RunResult => {
    const carried = loads.filter((item) => carries(job, run.id, item)).map((item) => item.load.id);
    const verdict = worstOf(results.filter((r) => carried.includes(r.id)).map((r) => r.verdict));
    const wires = shown.elements.filter((e) => e.of.kind === 'run' && e.of.id === run.id);
    if (wires.length === 0)
      return { id: run.id, amps: null, dropVolts: null, dropPercent: null, lossWatts: null, verdict };
    const amps: NonNullable<RunResult['amps']> = {};
    let lossWatts = NIL;
    for (const wire of wires) {
      const size = abs(shown.through(wire));
      amps[wire.of.conductor!] = size.toNumber();
      lossWatts = lossWatts.plus(size.times(size).times(wire.r));
    }
    const drops = livePairs(topology, run.from)
      .filter((ends) => ends.every((c) => run.conductors.includes(c)))
      .filter((ends, _, all) => ends[1] === 'N' || !all.some((each) => each[1] === 'N'))
      .map((ends) => {
        const near = readPair(topology, shown.voltage, run.from, ends);
        const far = readPair(topology, shown.voltage, run.to, ends);
        const dropVolts = near.volts.minus(far.volts);
        return { dropVolts, dropPercent: dropVolts.times(100).div(near.nominalVolts) };
      });
    const top = drops.reduce<(typeof drops)[number] | null>(
      (most, d) =>
        most === null || d.dropPercent.abs().gt(most.dropPercent.abs().plus(SAME_PERCENT)) ? d : most,
      null,
    );
    return {
      id: run.id,
      amps,
      dropVolts: top?.dropVolts.toNumber() ?? null,
      dropPercent: top?.dropPercent.toNumber() ?? null,
      lossWatts: lossWatts.toNumber(),
      verdict,
    };
  });
