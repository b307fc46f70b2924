import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { type TestDatabase, withTestDatabase } from '@farlug/db/testing';
import { createTransport } from 'nodemailer';
import { afterAll, afterEach, beforeAll, expect, it, vi } from 'vitest';
import { DEMO_ACCOUNTS } from '../src/demo/demo-accounts.ts';
import { TestClient } from './test-client.ts';

const main = fileURLToPath(new URL('../src/main.ts', import.meta.url));
const mailSink = fileURLToPath(new URL('../src/mailbox-main.ts', import.meta.url));
const directory = mkdtempSync(path.join(tmpdir(), 'farlug-main-'));
let database: TestDatabase;
let running: ChildProcess | undefined;
beforeAll(async () => {
  database = await withTestDatabase();
  mkdirSync(path.join(directory, 'web'));
  writeFileSync(path.join(directory, 'web/index.html'), '<!doctype html><title>Farlug</title>');
});
afterEach(() => {
  running?.kill('SIGKILL');
});
afterAll(async () => {
  await database.close();
  rmSync(directory, { recursive: true, force: true });
});

async function freePort(): Promise<number> {
  const server = createServer();
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as { port: number };
  server.close();
  return port;
}

function start(env: Record<string, string>, file = main) {
  const child = spawn(process.execPath, ['--import', 'tsx', file], {
    env: {
      PATH: process.env.PATH ?? '',
      TZ: 'UTC',
      DATABASE_URL: database.apiUrl,
      SESSION_SECRET: 's'.repeat(32),
      LINK_SECRET: 'l'.repeat(32),
      WEB_DIR: path.join(directory, 'web'),
      MAILBOX_DIR: path.join(directory, 'mail'),
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  running = child;
  let said = '';
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (text) => (said += String(text)));
  const ended = once(child, 'close').then(([code]) => ({ code: code as number | null, said }));
  return { child, ended };
}

async function serves(port: number): Promise<string> {
  const address = `http://127.0.0.1:${port}`;
  for (let tries = 0; tries < 200; tries += 1) {
    const status = await fetch(`${address}/healthz`).then(
      (response) => response.status,
      () => 0,
    );
    if (status === 200) return address;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error('the api does not serve');
}

it('refuses to start with neither the local flag nor a mail server, and says so', async () => {
  const { ended } = start({ PUBLIC_URL: 'https://farlug.firm.example' });
  const { code, said } = await ended;
  expect(code).toBe(78);
  expect(said).toMatch(/The api cannot start:\n {2}SMTP_URL is needed/);
});

it('says which of its ports is taken, and ends', async () => {
  const taken = createServer();
  taken.listen(0, '127.0.0.1');
  await once(taken, 'listening');
  const port = String((taken.address() as { port: number }).port);
  for (const env of [
    { PORT: port, MAILBOX_PORT: String(await freePort()) },
    { PORT: '0', MAILBOX_PORT: port },
  ]) {
    const { code, said } = await start({ FARLUG_LOCAL: '1', ...env }).ended;
    expect(code).toBe(1);
    expect(said).toMatch(/the api cannot start|EADDRINUSE/);
    expect(said).toContain(port);
  }
  taken.close();
});

it('seeds the demo firm once, keeps it through a restart, and stops when it is told to', async () => {
  const counts = async () => {
    const [row] = await database.asOwner(
      'select (select count(*)::int from firm) as firms, (select count(*)::int from job) as jobs, (select count(*)::int from person) as people',
    );
    return row;
  };
  for (let round = 0; round < 2; round += 1) {
    const port = await freePort();
    const { child, ended } = start({
      FARLUG_LOCAL: '1',
      PORT: String(port),
      MAILBOX_PORT: String(await freePort()),
    });
    const address = await serves(port);
    for (const { email, password, role } of DEMO_ACCOUNTS) {
      const { memberships } = await new TestClient(address).signIn(email, password);
      expect(memberships).toMatchObject([{ role }]);
    }
    expect(await counts()).toEqual({ firms: 1, jobs: 3, people: 3 });
    child.kill('SIGTERM');
    expect((await ended).code).toBe(0);
  }
});

it('runs its mail sink as a program of its own', async () => {
  const port = await freePort();
  const { child, ended } = start({ MAILBOX_PORT: String(port) }, mailSink);
  const transport = createTransport({ host: '127.0.0.1', port });
  await vi.waitFor(() => transport.verify(), { timeout: 20_000, interval: 100 });
  await transport.sendMail({ from: 'a@firm.example', to: 'b@firm.example', subject: 'Kept', text: 'Kept.' });
  transport.close();
  child.kill('SIGTERM');
  expect((await ended).code).toBe(0);
  const kept = readdirSync(path.join(directory, 'mail')).map((name) =>
    readFileSync(path.join(directory, 'mail', name), 'utf8'),
  );
  expect(kept.filter((message) => message.includes('Subject: Kept'))).toHaveLength(1);
});
