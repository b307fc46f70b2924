import { countAttempt, forgetAttempts, uncountAttempt } from '@farlug/db';
import type { ClientRateLimitInfo, Options, Store } from 'express-rate-limit';
import type { Deps } from '../deps.ts';

/** Attempts counted in PostgreSQL: one count for all processes, and a restart forgets none. */
export class RateCounterStore implements Store {
  readonly localKeys = false;
  private readonly deps: Deps;
  private readonly name: string;
  private windowS = 0;

  constructor(deps: Deps, name: string) {
    this.deps = deps;
    this.name = name;
  }

  init({ windowMs }: Options): void {
    this.windowS = windowMs / 1000;
  }

  async increment(key: string): Promise<ClientRateLimitInfo> {
    const { hits, endsAt } = await this.deps.db.global((tx) =>
      countAttempt(tx, this.keyOf(key), this.windowS),
    );
    return { totalHits: hits, resetTime: endsAt };
  }

  async decrement(key: string): Promise<void> {
    await this.deps.db.global((tx) => uncountAttempt(tx, this.keyOf(key), this.windowS));
  }

  async resetKey(key: string): Promise<void> {
    await this.deps.db.global((tx) => forgetAttempts(tx, this.keyOf(key)));
  }

  private keyOf(key: string): string {
    return `${this.name} ${key}`;
  }
}
