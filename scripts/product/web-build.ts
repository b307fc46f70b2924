import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { command, root } from '../gate/stage.ts';

const web = path.join(root, 'apps/web');
const stamp = path.join(web, 'dist/.built-from');
const sources = [
  'apps/web',
  'packages/contract/src',
  'packages/solver/src',
  'fixtures/jobs',
  'pnpm-lock.yaml',
  'tsconfig.base.json',
];
const unbuilt = new Set(['node_modules', 'dist', 'e2e']);

export const webRoot = path.join(web, 'dist');

/** Builds the pages when a file that goes into them has changed; says whether it had to. */
export async function buildWeb(): Promise<boolean> {
  const hash = hashOf(sources);
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return false;
  rmSync(stamp, { force: true });
  const vite = path.join(web, 'node_modules/vite/bin/vite.js');
  const { code, output } = await command(process.execPath, [vite, 'build', web, '--logLevel', 'warn'], {
    NO_COLOR: '1',
  });
  if (code !== 0) throw new Error(`the pages could not be built:\n${output}`);
  writeFileSync(stamp, hash);
  return true;
}

function hashOf(entries: readonly string[]): string {
  const hash = createHash('sha256');
  for (const entry of entries)
    for (const file of filesOf(entry)) hash.update(file).update(readFileSync(path.join(root, file)));
  return hash.digest('hex');
}

function filesOf(entry: string): string[] {
  if (/\.test\.tsx?$/.test(entry)) return [];
  if (/\.[a-z0-9]+$/i.test(path.basename(entry))) return [entry];
  const names = readdirSync(path.join(root, entry), { withFileTypes: true }).sort((a, b) =>
    a.name < b.name ? -1 : 1,
  );
  return names
    .filter((item) => !unbuilt.has(item.name))
    .flatMap((item) =>
      item.isDirectory() ? filesOf(`${entry}/${item.name}`) : leafOf(`${entry}/${item.name}`),
    );
}

function leafOf(file: string): string[] {
  return /\.test\.tsx?$/.test(file) ? [] : [file];
}
