// Whole jobs in `each-circuit`, every turn and headroom included, beside the dense solver of the tests.
import { readFileSync } from 'node:fs';
import { parseJob } from '../src/job/index.ts';
import { solveJob } from '../src/judge/index.ts';
import { solveDense } from '../test/dense/solve-dense.ts';
import { line, measure } from './measure.ts';

const out = (text: string) => void process.stdout.write(text);
out(`${'step'.padEnd(52)}${'median'.padStart(10)}      10 % … 90 %\n`);
for (const name of ['ridge-cabin', 'weaving-hall', 'tannery-row']) {
  const file = JSON.parse(
    readFileSync(new URL(`../../../fixtures/jobs/${name}.json`, import.meta.url), 'utf8'),
  );
  const parsed = parseJob(file);
  if (!parsed.ok) throw new Error(parsed.problems[0]!.message);
  const { job } = parsed;
  const size = `${job.runs.length} runs, ${job.loads.length} loads`;
  out(
    line(
      `${name}: read and check the file`,
      measure(() => file, parseJob, 20),
      size,
    ),
  );
  // A copy each time: a job's network is kept as long as the job is the same object.
  const ours = measure(
    () => ({ ...job }),
    (copy) => solveJob(copy, { scenario: 'each-circuit' }),
    30,
  );
  out(line(`${name}: solve each circuit`, ours));
  if (name === 'tannery-row') continue;
  const dense = measure(
    () => file,
    (copy) => solveDense(copy, 'each-circuit', false),
    3,
  );
  out(
    line(
      `${name}: the dense solver, without headroom`,
      dense,
      `ratio ${(dense.median / ours.median).toFixed(0)}`,
    ),
  );
}
