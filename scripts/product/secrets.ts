import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

export interface Secrets {
  SESSION_SECRET: string;
  LINK_SECRET: string;
}

/** Made once for this clone and kept, so that sessions and sent links live through a restart. */
export function keptSecrets(directory: string): Secrets {
  mkdirSync(directory, { recursive: true, mode: 0o755 });
  return {
    SESSION_SECRET: keptSecret(path.join(directory, 'session-secret')),
    LINK_SECRET: keptSecret(path.join(directory, 'link-secret')),
  };
}

function keptSecret(file: string): string {
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString('hex'), { mode: 0o600 });
  return readFileSync(file, 'utf8').trim();
}
