// The linear kernels on networks shaped like buildings, edge list in and all voltages out, beside native peers and
// mathjs in the same run. FARLUG_BENCH_MOST limits the unknowns (1,000,000 unless told).
import { lusolve, slu, sparse } from 'mathjs';
import {
  analyse,
  FourWireNetwork,
  factor,
  RealNetwork,
  type Shunts,
  selectedInverse,
  solve,
  WorstDrop,
} from '../src/linear/index.ts';
import { line, measure, timingOf } from './measure.ts';
import * as networks from './networks/networks.ts';
import { type PeerTiming, startPeers } from './peers/native.ts';

const out = (text: string) => void process.stdout.write(text);
const most = Number(process.env.FARLUG_BENCH_MOST ?? 1_000_000);
const sizes = [100, 1_000, 10_000, 100_000, 1_000_000].filter((n) => n <= most);
const timesFor = (n: number) => (n >= 1e6 ? 9 : n >= 1e5 ? 31 : 101);
const peers = startPeers();
const count = (n: number) => n.toLocaleString('en-US');
const memory = () => `${(process.resourceUsage().maxRSS / 1024).toFixed(0)} MB`;

for (const name of peers.missing) out(`not here, so not compared: ${name}\n`);
out(`${'work'.padEnd(58)}${'median'.padStart(9)}     10 % … 90 %\n`);

/** A peer's line and its ratio to our own median. */
function beside(name: string, own: number, theirs: PeerTiming | undefined): void {
  if (theirs)
    out(
      line(
        `    ${name}`,
        theirs,
        `ratio ${(theirs.median / own).toFixed(1)}, ${theirs.peakMB.toFixed(0)} MB`,
      ),
    );
}

function real(title: string, net: networks.RealNetwork): number {
  const volts = new Float64Array(net.buses + 1);
  const step = () => {
    const network = new RealNetwork(net.buses, net.from, net.to);
    network.setOhms(net.ohms);
    network.solve(net.amps, volts);
  };
  const own = measure(() => null, step, timesFor(net.buses));
  out(line(`${title}, ${count(net.buses)}`, own, memory()));
  const file = peers.saveReal(net);
  const repeats = net.buses >= 1e6 ? 3 : net.buses >= 1e5 ? 9 : 41;
  beside('CHOLMOD', own.median, peers.cholmod?.(file, repeats));
  if (net.buses >= 10_000) beside('SciPy splu', own.median, peers.splu?.(file, Math.min(repeats, 9)));
  return own.median;
}

function fourWire(title: string, net: networks.FourWireNetwork): number {
  const vRe = new Float64Array(4 * net.buses + 4);
  const vIm = new Float64Array(4 * net.buses + 4);
  const shunts = shuntsOf(net);
  const step = () => {
    const network = new FourWireNetwork(net.buses, net.from, net.to);
    network.setValues(net.zRe, net.zIm, shunts);
    network.solve(net.ampsRe, net.ampsIm, vRe, vIm);
  };
  const n = 4 * net.buses;
  const own = measure(() => null, step, timesFor(n));
  out(line(`${title}, ${count(n)}`, own, memory()));
  beside('KLU, complex', own.median, peers.klu?.(peers.saveFourWire(net), n >= 1e5 ? 3 : 21));
  return own.median;
}

function shuntsOf({ buses, shunt }: networks.FourWireNetwork): Shunts | null {
  const bus = Int32Array.from({ length: buses }, (_, i) => i).filter((i) => shunt[4 * i + 3] !== 0);
  if (bus.length === 0) return null;
  const yRe = new Float64Array(10 * bus.length);
  for (let i = 0; i < bus.length; i++) yRe[10 * i + 9] = shunt[4 * bus[i]! + 3]!;
  return { bus, yRe, yIm: new Float64Array(yRe.length) };
}

for (const n of sizes) real('radial, real', networks.realNetwork(n, 0));
for (const n of sizes.slice(2)) real('radial, real, shuffled', networks.shuffled(networks.realNetwork(n, 0)));
for (const n of sizes) real('1 % rings, real', networks.realNetwork(n, Math.max(1, n / 100)));
for (const n of sizes) fourWire('four-wire, radial', networks.fourWireNetwork(n, 0, false));
for (const n of sizes)
  fourWire(
    'four-wire, 1 % rings and earth electrodes',
    networks.fourWireNetwork(n, Math.max(1, Math.round(n / 400)), true),
  );

/** mathjs' sparse LU on the matrix of a network of one conductor, assembled outside the clock. */
function mathjsReal(n: number): void {
  const net = networks.realNetwork(n, 0);
  const own = real('radial, real, for mathjs', net);
  const matrix = sparse();
  matrix.resize([n, n]);
  const entries = new Map<string, [i: number, j: number, y: number]>();
  const add = (i: number, j: number, y: number) => {
    const was = entries.get(`${i},${j}`);
    if (was) was[2] += y;
    else entries.set(`${i},${j}`, [i, j, y]);
  };
  for (let e = 0; e < n; e++) {
    const a = net.from[e]!;
    const b = net.to[e]!;
    const y = 1 / net.ohms[e]!;
    add(b, b, y);
    if (a === n) continue;
    add(a, a, y);
    add(a, b, -y);
    add(b, a, -y);
  }
  for (const [i, j, y] of entries.values()) matrix.set([i, j], y);
  const right = Array.from(net.amps, (amps) => [amps]);
  const theirs = timingOf(
    Array.from({ length: 3 }, () => {
      const began = performance.now();
      lusolve(slu(matrix, 1, 1e-3), right);
      return performance.now() - began;
    }),
  );
  out(line('    mathjs slu', theirs, `ratio ${(theirs.median / own).toFixed(0)}`));
}
if (most >= 10_000) mathjsReal(10_000);

/** The general solver behind every job: complex, any pattern. */
function general(net: networks.RealNetwork): void {
  const n = net.buses;
  const inside = Int32Array.from(net.from.keys()).filter((e) => net.from[e] !== n);
  const a = inside.map((e) => net.from[e]!);
  const b = inside.map((e) => net.to[e]!);
  const shuntRe = new Float64Array(n);
  for (const [e, from] of net.from.entries()) if (from === n) shuntRe[net.to[e]!]! += 1 / net.ohms[e]!;
  const branchRe = Float64Array.from(inside, (e) => 1 / net.ohms[e]!);
  const values = {
    branchRe,
    branchIm: new Float64Array(branchRe.length),
    shuntRe,
    shuntIm: new Float64Array(n),
  };
  const whole = () => {
    const outcome = factor(analyse(n, a, b), values);
    if (!outcome.ok) throw new Error('the network is tied to its source');
    const re = net.amps.slice();
    solve(outcome.factor, re, new Float64Array(n));
    return outcome.factor;
  };
  const own = measure(() => null, whole, timesFor(n));
  out(line(`the solver of jobs: analyse, factor, solve, ${count(n)}`, own, memory()));
  const kept = whole();
  const points = measure(
    () => null,
    () => selectedInverse(kept),
    timesFor(n),
  );
  const note = `${(points.median / own.median).toFixed(2)} × the line above`;
  out(line('    driving-point impedances of all places', points, note));
}
for (const n of sizes.slice(1)) general(networks.realNetwork(n, 0));
for (const n of sizes.slice(1)) general(networks.realNetwork(n, Math.max(1, n / 100)));

/** One run resized, one load changed, all sizes of one run: microseconds each, beside a whole solution. */
function edits(n: number, rings: number): void {
  const net = networks.realNetwork(n, rings);
  const network = new RealNetwork(net.buses, net.from, net.to);
  const volts = new Float64Array(n + 1);
  const whole = () => {
    network.setOhms(net.ohms);
    network.solve(net.amps, volts);
  };
  const full = measure(() => null, whole, timesFor(n)).median;
  whole();
  const live = new WorstDrop(network, net.ohms, net.amps, volts, (bus) => net.amps[bus]! > 0);
  const random = networks.uniform(99);
  const pick = (k: number) => Math.floor(random() * k);
  const report = (title: string, times: number, step: () => void, asked = 1) => {
    for (let k = 0; k < 5000; k++) step();
    const taken: number[] = [];
    for (let k = 0; k < times; k++) {
      const began = performance.now();
      step();
      taken.push(performance.now() - began);
    }
    taken.sort((p, q) => p - q);
    const at = (share: number) => taken[Math.floor(share * times)]! * 1000;
    const ratio = (asked * full * 1000) / at(0.5);
    out(
      `${`${title}, ${count(n)}${rings > 0 ? ', 1 % rings' : ''}`.padEnd(58)}${at(0.5).toFixed(2).padStart(9)} µs  p99 ${at(0.99).toFixed(1)} µs, ratio ${ratio.toFixed(0)}\n`,
    );
  };
  report('one run resized, worst drop known', 20_000, () => {
    const e = pick(net.from.length);
    live.setOhms(e, net.ohms[e]! * (0.5 + random()));
  });
  report('one load changed, worst drop known', 20_000, () => {
    live.setAmps(pick(n), 2 * random());
  });
  const factors = Array.from({ length: 30 }, (_, k) => 0.1 + k / 10);
  const ohms = new Float64Array(30);
  const worst = new Float64Array(30);
  const ringed = rings > 0 ? network.rings!.coupled.run : null;
  report(
    ringed ? '30 sizes of one run in a ring' : '30 sizes of one run',
    20_000,
    () => {
      const e = ringed ? ringed[pick(ringed.length)]! : pick(n);
      for (let k = 0; k < 30; k++) ohms[k] = net.ohms[e]! * factors[k]!;
      live.ofSizes(e, ohms, worst);
    },
    30,
  );
}
for (const n of [10_000, 100_000].filter((size) => size <= most))
  for (const rings of [0, n / 100]) edits(n, rings);

peers.end();
