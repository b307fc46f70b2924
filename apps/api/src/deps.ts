import type { Database } from '@farlug/db';
import type { Config } from './config.ts';
import type { Logger } from './platform/logger.ts';
import type { RateLimits } from './platform/rate-limits.ts';

/** What every service may use; made once in main, and once per test. */
export interface Deps {
  config: Config;
  db: Database;
  log: Logger;
  now: () => Date;
  rateLimits: RateLimits;
}
