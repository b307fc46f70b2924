// Starts a PostgreSQL cluster of the project's own and stops it when the last process that needed it is done.
// Each user leaves a lease named after its process, so that two test runs side by side, or one that was killed,
// neither stop a cluster under somebody else's feet nor leave it running for ever.
import { spawn } from 'node:child_process';
import { mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');
const script = path.join(root, 'scripts/pg.sh');

/** @type {Record<'work' | 'test', Record<string, string>>} */
const settings = {
  work: {},
  test: { PG_FAST: '1', PG_PORT: '54429', PG_DB: 'farlug_test' },
};

let taken = 0;

/** @type {Set<() => Promise<void>>} */
const held = new Set();

/** For whoever is told to stop in the middle of its work. */
export async function releaseClusters() {
  await Promise.all([...held].map((release) => release()));
}

/** @param {'work' | 'test'} kind */
function environment(kind) {
  const env = { ...process.env, ...settings[kind] };
  if (kind === 'work') delete env.PG_FAST;
  return env;
}

/**
 * Runs the script outside the terminal's process group: Ctrl-C must not break off a start half way.
 * @param {string} command
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<string>}
 */
function run(command, env) {
  return new Promise((resolve, reject) => {
    const child = spawn('bash', [script, command], {
      cwd: root,
      env,
      stdio: ['ignore', 'pipe', command === 'start' ? 'inherit' : 'ignore'],
      detached: true,
    });
    let printed = '';
    child.stdout?.on('data', (chunk) => {
      printed += chunk;
    });
    child.once('error', reject);
    child.once('close', (code) =>
      code === 0
        ? resolve(printed.trim())
        : reject(new Error(`scripts/pg.sh ${command} ended with code ${code}`)),
    );
  });
}

/**
 * @param {'work' | 'test'} kind
 * @param {string} command
 * @param {Record<string, string>} more
 */
async function pg(kind, command, more = {}) {
  const env = { ...environment(kind), ...more };
  if (kind === 'test') env.PG_DIR = await testDirectory();
  return run(command, env);
}

// As root the server runs as user postgres, who cannot enter every home directory: the script knows where then.
async function testDirectory() {
  return `${await run('where', { ...process.env, PG_FAST: '' })}-test`;
}

/** @param {number} pid */
function alive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return /** @type {NodeJS.ErrnoException} */ (error).code === 'EPERM';
  }
}

/** @param {string} leases */
function holders(leases) {
  const names = readdirSync(leases);
  const living = names.filter((name) => alive(Number.parseInt(name, 10)));
  for (const name of names) if (!living.includes(name)) rmSync(path.join(leases, name), { force: true });
  return { living: living.length, ever: names.length };
}

/**
 * @param {'work' | 'test'} kind
 * @returns {Promise<{ url: string, release: () => Promise<void> }>} the owner's URL, and how to say that it is no longer needed
 */
export async function useCluster(kind) {
  const leases = path.join(root, '.data/leases', kind);
  mkdirSync(leases, { recursive: true, mode: 0o755 });
  const running = await pg(kind, 'status').then(
    () => true,
    () => false,
  );
  const startedByHand = running && holders(leases).ever === 0;
  const lease = path.join(leases, `${process.pid}-${taken++}`);
  if (!startedByHand) writeFileSync(lease, '');
  const starting = pg(kind, 'start');
  const release = async () => {
    held.delete(release);
    await starting.catch(() => {});
    rmSync(lease, { force: true });
    if (!startedByHand && holders(leases).living === 0) await pg(kind, 'stop');
  };
  held.add(release);
  return { url: await starting, release };
}

/**
 * An empty database in the running test cluster, for the journeys.
 * @param {string} name
 * @returns {Promise<string>} the owner's URL
 */
export function emptyTestDatabase(name) {
  return pg('test', 'renew', { PG_DB: name });
}
