// The solve command from process start to output, beside a process that only reads and checks the same file.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { bigJob } from './big-job.ts';
import { line, timingOf } from './measure.ts';

const ROUNDS = 7;
const folder = mkdtempSync(join(tmpdir(), 'farlug-bench-'));
const at = (path: string) => fileURLToPath(new URL(path, import.meta.url));
const out = (text: string) => void process.stdout.write(text);

/** Milliseconds of one process, its output kept in memory. */
function taken(args: string[]): number {
  const began = performance.now();
  const done = spawnSync(process.execPath, args, { encoding: 'utf8', maxBuffer: 1 << 28 });
  if (done.status !== 0) throw new Error(`${args.join(' ')}: ${done.stderr}${done.stdout}`);
  return performance.now() - began;
}

out(`${'work'.padEnd(58)}${'median'.padStart(9)}     10 % … 90 %\n`);
for (const circuits of [160, 1_000, 10_000]) {
  const file = join(folder, `${circuits}.json`);
  writeFileSync(file, JSON.stringify(bigJob(circuits)));
  const read: number[] = [];
  const solve: number[] = [];
  for (let round = 0; round < ROUNDS; round++) {
    read.push(taken(['--import', 'tsx', at('./read-main.ts'), file]));
    solve.push(taken([at('../../../scripts/run.mjs'), 'solve', file]));
  }
  const reading = timingOf(read);
  const solving = timingOf(solve);
  out(line(`${circuits.toLocaleString('en-US')} circuits: read and check only, whole process`, reading));
  out(
    line(
      '    solve, process start to output',
      solving,
      `ratio ${(solving.median / reading.median).toFixed(2)}`,
    ),
  );
}
rmSync(folder, { recursive: true });
