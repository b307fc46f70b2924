// What the scripts of package.json call. Needs only Node.js: it installs the packages, then hands over to TypeScript.
import { forgetNpmSettings, install } from './install.mjs';

/** @type {Record<string, { file: string, about: string, prepare?: () => Promise<void> | void }>} */
const commands = {
  start: { file: './start.ts', about: 'everything a person needs, on one port', prepare: refuseBusyPort },
  test: { file: './gate.ts', about: 'every check; --deep runs the long ones' },
  check: { file: './gate.ts', about: 'the quick checks: format, lint, types, boundaries, audits' },
  bench: { file: './bench.ts', about: 'the benchmarks, or those whose name holds the given word' },
  solve: { file: '../packages/solver/src/solve-main.ts', about: 'solve one job file' },
  'check:peers': {
    file: '../packages/solver/test/peers/check-main.ts',
    about: 'node volts of random jobs beside ngspice and SciPy',
  },
  'db:generate': { file: './db-generate.ts', about: 'write a migration from the schema' },
  'new:feature': { file: './new-feature.ts', about: 'the files of a new feature, in every layer' },
};

const [name = '', ...args] = process.argv.slice(2);
const command = commands[name];
if (!command) {
  const lines = Object.entries(commands).map(([key, { about }]) => `  ${key.padEnd(12)} ${about}`);
  process.stderr.write(`usage: node scripts/run.mjs COMMAND\n${lines.join('\n')}\n`);
  process.exit(64);
}

// npm runs scripts in the root; a path that a person types is meant from where they stand.
const from = process.env.npm_lifecycle_event === name ? process.env.INIT_CWD : undefined;
forgetNpmSettings();
await command.prepare?.();
const began = performance.now();
install({ quiet: name === 'solve' });
process.env.FARLUG_INSTALL_SECONDS = ((performance.now() - began) / 1000).toFixed(1);
if (name === 'solve' && from) process.chdir(from);

const { register } = await import('tsx/esm/api');
register();
const entry = new URL(command.file, import.meta.url);
process.argv = [process.argv[0] ?? 'node', entry.pathname, ...(name === 'check' ? ['--quick'] : []), ...args];
await import(entry.href);

async function refuseBusyPort() {
  const { portProblem } = await import('./port.mjs');
  const problem = await portProblem(process.env.PORT);
  if (!problem) return;
  process.stderr.write(`${problem}\n`);
  process.exit(1);
}
