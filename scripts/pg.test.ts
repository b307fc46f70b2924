import { spawnSync } from 'node:child_process';
import { mkdtempSync, realpathSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { root } from './gate/stage.ts';

let directory: string;
beforeAll(() => {
  directory = path.join(realpathSync(mkdtempSync(path.join(tmpdir(), 'farlug pg '))), 'pg');
});
afterAll(() => {
  pg('destroy', { PG_DIR: directory });
  rmSync(path.dirname(directory), { recursive: true, force: true });
});

function pg(command: string, env: Record<string, string>) {
  const { PG_DIR, PG_FAST, PG_PORT, PG_DB, ...clean } = process.env;
  const done = spawnSync('bash', [path.join(root, 'scripts/pg.sh'), command], {
    encoding: 'utf8',
    env: { ...clean, ...env },
  });
  return { code: done.status, out: done.stdout.trim(), said: done.stderr.trim() };
}

it('never runs the cluster that keeps work without fsync', () => {
  const { code, said } = pg('start', { PG_FAST: '1' });
  expect(code).toBe(1);
  expect(said).toContain('give the tests a PG_DIR of their own');
});

it('starts in a directory whose name has spaces, once, on loopback, and stops', () => {
  const env = { PG_DIR: directory, PG_FAST: '1', PG_PORT: '54629' };
  expect(pg('status', env).code).toBe(3);
  const first = pg('start', env);
  expect(first.out).toMatch(/^postgres:\/\/farlug_owner:[0-9a-f]{48}@127\.0\.0\.1:\d+\/farlug$/);
  expect(pg('start', env).out).toBe(first.out);
  expect(pg('url', env).out).toBe(first.out);
  expect(pg('status', env).code).toBe(0);
  pg('stop', env);
  expect(pg('status', env).code).toBe(3);
  expect(pg('url', env).code).toBe(1);
});

it('deletes a database only where the cluster is for tests', () => {
  expect(pg('renew', { PG_DIR: directory }).said).toContain('renew is for the tests');
});
