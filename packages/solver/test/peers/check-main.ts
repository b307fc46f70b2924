// `npm run check:peers [-- JOBS [SEED]]`: node volts of random jobs beside ngspice and SciPy, where the machine has them.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { SYSTEMS } from '../../src/job/index.ts';
import { randomJob } from '../support/random-job.ts';
import { apart, type Circuit, circuitOf, type Pair } from './circuit.ts';
import { netlistOf, readRaw } from './netlist.ts';

/** Of the largest volt. The peers factor diagonals: a short thick run beside a long thin one costs them digits. */
const TOLERANCE = 1e-8;

const out = (text: string) => void process.stdout.write(`${text}\n`);
const jobs = Number(process.argv[2] ?? 40);
const seed = Number(process.argv[3] ?? 1);
if (!Number.isInteger(jobs) || jobs < 1 || !Number.isInteger(seed)) {
  process.stderr.write('usage: npm run check:peers [-- JOBS [SEED]]: whole numbers, JOBS at least 1\n');
  process.exit(64);
}
const folder = mkdtempSync(join(tmpdir(), 'farlug-peers-'));

function byNgspice(circuit: Circuit): (Pair | undefined)[] {
  const deck = join(folder, 'job.cir');
  const raw = join(folder, 'job.raw');
  rmSync(raw, { force: true });
  writeFileSync(deck, netlistOf(circuit, raw));
  const done = spawnSync('ngspice', ['-b', deck], { encoding: 'utf8' });
  try {
    return readRaw(readFileSync(raw, 'utf8'));
  } catch {
    throw new Error(`ngspice wrote no volts:\n${done.stdout}${done.stderr}`);
  }
}

function byScipy(circuits: readonly Circuit[]): Pair[][] {
  const script = fileURLToPath(new URL('./solve-scipy.py', import.meta.url));
  const done = spawnSync('python3', [script], {
    input: JSON.stringify(circuits),
    encoding: 'utf8',
    maxBuffer: 1 << 28,
  });
  if (done.status !== 0) throw new Error(done.stderr);
  return JSON.parse(done.stdout) as Pair[][];
}

const has = {
  ngspice: spawnSync('ngspice', ['--version']).status === 0,
  SciPy: spawnSync('python3', ['-c', 'import scipy']).status === 0,
};
for (const [peer, there] of Object.entries(has))
  if (!there) out(`${peer} is not on this machine: not compared`);

let agreed = 0;
let differ = 0;
let refused = 0;
out(
  `${'system'.padEnd(14)}${'jobs'.padStart(6)}${'nodes'.padStart(8)}${'ngspice'.padStart(12)}${'SciPy'.padStart(12)}   largest difference`,
);
for (const system of SYSTEMS) {
  const circuits: { circuit: Circuit; seed: number }[] = [];
  for (let k = 0; k < jobs; k++) {
    const circuit = circuitOf(randomJob(seed + k, { system }));
    if (circuit) circuits.push({ circuit, seed: seed + k });
    else refused++;
  }
  const scipy = has.SciPy ? byScipy(circuits.map(({ circuit }) => circuit)) : null;
  const worst = { ngspice: 0, SciPy: 0 };
  for (const [i, { circuit, seed: from }] of circuits.entries()) {
    const spice = has.ngspice ? byNgspice(circuit) : null;
    // A node that nothing but the product's own list names is in no deck; its volts are what they are given as.
    const found = {
      ngspice: spice
        ? apart(
            circuit.volts,
            circuit.volts.map((own, n) => spice[n] ?? own),
          )
        : 0,
      SciPy: scipy ? apart(circuit.volts, scipy[i]!) : 0,
    };
    const beyond = Object.entries(found).filter(([, difference]) => !(difference <= TOLERANCE));
    for (const [peer, difference] of beyond)
      out(`  ${system}, seed ${from}: ${peer} differs by ${difference.toExponential(1)} of the largest volt`);
    if (beyond.length > 0) differ++;
    else agreed++;
    worst.ngspice = Math.max(worst.ngspice, found.ngspice);
    worst.SciPy = Math.max(worst.SciPy, found.SciPy);
  }
  const nodes = circuits.reduce((sum, { circuit }) => sum + circuit.volts.length, 0);
  const shown = (peer: keyof typeof has) =>
    (has[peer] ? worst[peer].toExponential(1) : 'not here').padStart(12);
  out(
    `${system.padEnd(14)}${String(circuits.length).padStart(6)}${String(nodes).padStart(8)}${shown('ngspice')}${shown('SciPy')}`,
  );
}
rmSync(folder, { recursive: true });
out(`${agreed} agreed, ${differ} differ, ${refused} refused by the product and not compared`);
process.exitCode = differ > 0 ? 1 : 0;
