import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

export interface Secrets {
  SESSION_SECRET: string;
  LINK_SECRET: string;
  API_PASSWORD: string;
  WORKER_PASSWORD: string;
}

/**
 * Made once for this clone and kept, so that sessions and sent links live through a restart. The passwords are those of
 * the two database roles, which belong to the whole cluster.
 */
export function keptSecrets(directory: string): Secrets {
  mkdirSync(directory, { recursive: true, mode: 0o755 });
  return {
    SESSION_SECRET: keptSecret(path.join(directory, 'session-secret')),
    LINK_SECRET: keptSecret(path.join(directory, 'link-secret')),
    API_PASSWORD: keptSecret(path.join(directory, 'api-password')),
    WORKER_PASSWORD: keptSecret(path.join(directory, 'worker-password')),
  };
}

function keptSecret(file: string): string {
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString('hex'), { mode: 0o600 });
  return readFileSync(file, 'utf8').trim();
}
