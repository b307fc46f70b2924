// Brings node_modules in line with the lockfile. Built-in modules only: it runs before anything is installed.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');
const stamp = path.join(root, 'node_modules/.installed-from');

/** npm's own settings must not reach pnpm, nor anything else that is started from here; only where packages come from. */
export function forgetNpmSettings() {
  for (const name of Object.keys(process.env)) {
    if (/^npm_(?!config_registry$)/i.test(name)) delete process.env[name];
  }
}

function manifests() {
  const workspaces = ['apps', 'packages'].flatMap((folder) =>
    readdirSync(path.join(root, folder)).map((name) => path.join(folder, name, 'package.json')),
  );
  return ['pnpm-lock.yaml', 'pnpm-workspace.yaml', 'package.json', ...workspaces]
    .map((file) => path.join(root, file))
    .filter((file) => existsSync(file));
}

function wanted() {
  const hash = createHash('sha256');
  for (const file of manifests()) hash.update(file).update(readFileSync(file));
  return hash.digest('hex');
}

/**
 * @param {string[]} args
 * @param {import('node:child_process').StdioOptions} stdio
 */
export function pnpm(args, stdio = 'inherit') {
  const { packageManager } = JSON.parse(readFileSync(path.join(root, 'package.json'), 'utf8'));
  const name = packageManager.split('+')[0];
  return spawnSync('npx', ['--yes', '--prefer-offline', name, ...args], {
    cwd: root,
    stdio,
    env: process.env,
  });
}

/** @param {{ quiet?: boolean }} options quiet: everything it says goes to standard error */
export function install({ quiet = false } = {}) {
  const hash = wanted();
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return;
  const args = ['install', '--frozen-lockfile', '--prefer-offline', '--reporter=append-only'];
  const done = pnpm(args, quiet ? ['ignore', 2, 2] : ['ignore', 'inherit', 'inherit']);
  if (done.status !== 0) {
    process.stderr.write('The packages could not be installed: the lines above say why.\n');
    process.exit(done.status ?? 1);
  }
  writeFileSync(stamp, hash);
}
