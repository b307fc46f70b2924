import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Writable } from 'node:stream';
import { type TestDatabase, withTestDatabase } from '@farlug/db/testing';
import { createApp } from '../src/app.ts';
import { type Config, readConfig } from '../src/config.ts';
import type { Deps } from '../src/deps.ts';
import { createLogger } from '../src/platform/logger.ts';
import { RATE_LIMITS, type RateLimits } from '../src/platform/rate-limits.ts';
import { TestClient } from './test-client.ts';

export interface TestApi {
  url: string;
  deps: Deps;
  database: TestDatabase;
  /** What the api logged, a line each. */
  logged: string[];
  /** Of what arrived by the local mailbox, and whatever else a test wants to leave in files. */
  directory: string;
  client: () => TestClient;
  close: () => Promise<void>;
}
export interface TestApiOptions {
  config?: Partial<Config>;
  rateLimits?: RateLimits;
  now?: () => Date;
  /** Another api's database, to be shared; it stays open when this one closes. */
  database?: TestDatabase;
}

/** Limits that no test meets by accident. */
const GENEROUS = Object.fromEntries(
  Object.keys(RATE_LIMITS).map((name) => [name, { hits: 10_000, windowS: 900 }]),
);

/** The whole api on a port of its own, over a real database of its own. */
export async function startTestApi(options: TestApiOptions = {}): Promise<TestApi> {
  const database = options.database ?? (await withTestDatabase());
  const directory = mkdtempSync(path.join(tmpdir(), 'farlug-api-'));
  const logged: string[] = [];
  const deps: Deps = {
    config: { ...testConfig(database.apiUrl, directory), ...options.config },
    db: database.db,
    log: createLogger(
      'warn',
      new Writable({
        write(line, _encoding, done) {
          logged.push(String(line));
          done();
        },
      }),
    ),
    now: options.now ?? (() => new Date()),
    rateLimits: options.rateLimits ?? GENEROUS,
  };
  const server = createServer(createApp(deps));
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  return {
    url,
    deps,
    database,
    logged,
    directory,
    client: () => new TestClient(url),
    close: async () => {
      const closed = once(server, 'close');
      server.close();
      server.closeAllConnections();
      await closed;
      if (!options.database) await database.close();
      rmSync(directory, { recursive: true, force: true });
    },
  };
}

function testConfig(databaseUrl: string, directory: string): Config {
  const outcome = readConfig({
    PORT: '0',
    PUBLIC_URL: 'http://127.0.0.1',
    DATABASE_URL: databaseUrl,
    SESSION_SECRET: 'session-secret-of-the-tests-0123456789',
    LINK_SECRET: 'link-secret-of-the-tests-0123456789',
    SMTP_URL: 'smtp://127.0.0.1:1',
    MAILBOX_DIR: path.join(directory, 'mailbox'),
    WEB_DIR: path.join(directory, 'web'),
    NODE_ENV: 'test',
  });
  if (!outcome.ok) throw new Error(outcome.problems.join('\n'));
  return outcome.config;
}
