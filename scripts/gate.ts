// The gate of `npm test` and `npm run check`: every stage, its seconds, and one line at the end with the sum.
import { releaseClusters } from './cluster.mjs';
import { audits } from './gate/audits.ts';
import { boundaries } from './gate/boundaries.ts';
import { format } from './gate/format.ts';
import { journeys } from './gate/journeys.ts';
import { type Check, type Stage, stopCommands } from './gate/stage.ts';
import { tests } from './gate/tests.ts';
import { types } from './gate/types.ts';
import { unused } from './gate/unused.ts';

const quick = process.argv.includes('--quick');
if (process.argv.includes('--deep')) process.env.FARLUG_DEEP = '1';
process.env.TZ = 'UTC';

let stopped = false;
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
  process.once(signal, () => {
    stopped = true;
    process.stdout.write(`\nstopped by ${signal}: nothing is proved\n`);
    stopCommands();
    void releaseClusters().finally(() => process.exit(1));
  });
}

const totals = { passed: 0, failed: 0 };
const failures: string[] = [];
const seconds = (since: number): string => `${((performance.now() - since) / 1000).toFixed(1)} s`;
const began = performance.now();
const installed = process.env.FARLUG_INSTALL_SECONDS;
if (installed) process.stdout.write(`installed${' '.repeat(46)}${installed} s\n`);

async function runStage(stage: Stage): Promise<void> {
  if (stopped) return;
  const start = performance.now();
  const checks = await stage.run().catch((error: unknown): Check[] => [
    {
      name: stage.name,
      passed: 0,
      failed: 1,
      detail: error instanceof Error ? error.stack : String(error),
    },
  ]);
  if (stopped) return;
  const passed = checks.reduce((sum, check) => sum + check.passed, 0);
  // A stage that checked nothing has proved nothing.
  const failed = passed + checks.reduce((sum, check) => sum + check.failed, 0) === 0 ? 1 : sumFailed(checks);
  totals.passed += passed;
  totals.failed += failed;
  for (const check of checks)
    if (check.failed > 0) failures.push(`✗ ${stage.name}: ${check.name}\n${check.detail ?? ''}`);
  const counts = `${String(passed).padStart(5)} passed ${String(failed).padStart(3)} failed`;
  process.stdout.write(`${stage.name.padEnd(46)}${counts.padEnd(26)}${seconds(start)}\n`);
  if (checks.length > 1 && checks.some((check) => check.passed > 1)) printProjects(checks);
}

function sumFailed(checks: readonly Check[]): number {
  return checks.reduce((sum, check) => sum + check.failed, 0);
}

function printProjects(checks: readonly Check[]): void {
  for (const { name, passed, failed } of checks) {
    process.stdout.write(
      `  ${name.padEnd(44)}${String(passed).padStart(5)} passed ${String(failed).padStart(3)} failed\n`,
    );
  }
}

/** Two at a time: on two cores more would only make each slower and its seconds meaningless. */
async function runTogether(stages: readonly Stage[]): Promise<void> {
  const waiting = [...stages];
  const lane = async (): Promise<void> => {
    for (let stage = waiting.shift(); stage; stage = waiting.shift()) await runStage(stage);
  };
  await Promise.all([lane(), lane()]);
}

await runTogether([boundaries, types, unused, format, audits]);
if (!quick) for (const stage of [tests, journeys]) await runStage(stage);

for (const failure of failures) process.stdout.write(`\n${failure}\n`);
process.stdout.write(`\nin ${seconds(began)}\n${totals.passed} passed, ${totals.failed} failed\n`);
process.exitCode = totals.failed === 0 && totals.passed > 0 ? 0 : 1;
