import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { migrate } from '../../packages/db/src/migrate.ts';
import { root } from '../gate/stage.ts';
import { freePort } from '../port.mjs';
import type { Secrets } from './secrets.ts';
import { type ServiceProcess, startService } from './service-process.ts';
import { webRoot } from './web-build.ts';

export interface LaunchOptions {
  port: number;
  ownerUrl: string;
  secrets: Secrets;
  /** Where the local mail sink keeps its messages. */
  mailDirectory: string;
  /** File for what the processes say. */
  log: string;
  /** Called as soon as there is something to stop, before the product can serve. */
  onStarted?: (stop: () => Promise<void>) => void;
}

export interface Product {
  address: string;
  /** Resolves when one of the processes ended by itself, with which and how. */
  broken: Promise<string>;
  stop: () => Promise<void>;
}

/** Brings the database up to date and starts api, worker and mail sink; resolves once the product can serve. */
export async function launch(options: LaunchOptions): Promise<Product> {
  const urls = await migrate({
    ownerUrl: options.ownerUrl,
    apiPassword: options.secrets.API_PASSWORD,
    workerPassword: options.secrets.WORKER_PASSWORD,
  });
  mkdirSync(options.mailDirectory, { recursive: true });
  mkdirSync(path.dirname(options.log), { recursive: true });
  writeFileSync(options.log, '');
  const address = `http://127.0.0.1:${options.port}`;
  const shared = {
    NODE_ENV: 'production',
    TZ: 'UTC',
    FARLUG_LOCAL: '1',
    PORT: String(options.port),
    PUBLIC_URL: address,
    WEB_DIR: webRoot,
    MAILBOX_PORT: String(await freePort()),
    MAILBOX_DIR: options.mailDirectory,
    SESSION_SECRET: options.secrets.SESSION_SECRET,
    LINK_SECRET: options.secrets.LINK_SECRET,
  };
  const start = (name: string, file: string, env: NodeJS.ProcessEnv): ServiceProcess =>
    startService(name, path.join(root, 'apps/api/src', file), { ...shared, ...env }, options.log);
  const services = [
    start('api', 'main.ts', { DATABASE_URL: urls.apiUrl }),
    start('worker', 'worker-main.ts', { DATABASE_URL: urls.workerUrl, WORKER_DATABASE_URL: urls.workerUrl }),
  ];
  const broken = Promise.race(services.map(async ({ name, ended }) => `${name} ${await ended}`));
  const stop = async (): Promise<void> => {
    await Promise.all(services.map((service) => service.stop()));
  };
  options.onStarted?.(stop);
  const refusal = await Promise.race([broken, answers(options.port)]);
  if (refusal === undefined) return { address, broken, stop };
  await stop();
  throw new Error(`${refusal}\n${lastLines(options.log)}`);
}

/** The end of what the processes said, for whoever has to find out why one of them ended. */
export function lastLines(log: string): string {
  return readFileSync(log, 'utf8').trimEnd().split('\n').slice(-20).join('\n');
}

async function answers(port: number): Promise<string | undefined> {
  const deadline = performance.now() + 90_000;
  while (performance.now() < deadline) {
    const status = await fetch(`http://127.0.0.1:${port}/healthz`, {
      signal: AbortSignal.timeout(5_000),
    }).then(
      (response) => response.status,
      () => 0,
    );
    if (status === 200) return undefined;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  return 'the api did not answer GET /healthz with 200 within 90 seconds';
}
