import { and, eq, lt, sql } from 'drizzle-orm';
import type { Transaction } from '../database.ts';
import { rateCounter } from '../schema/index.ts';

export interface RateCount {
  hits: number;
  endsAt: Date;
}

/** Counts one more attempt under `key` in the present window of so many seconds, for all processes together. */
export async function countAttempt(tx: Transaction, key: string, windowS: number): Promise<RateCount> {
  const [counted] = await tx.sql
    .insert(rateCounter)
    .values({ key, windowStart: windowOf(windowS), hits: 1 })
    .onConflictDoUpdate({
      target: [rateCounter.key, rateCounter.windowStart],
      set: { hits: sql`${rateCounter.hits} + 1` },
    })
    .returning({ hits: rateCounter.hits, windowStart: rateCounter.windowStart });
  if (counted === undefined) throw new Error('a counter was neither made nor raised');
  return { hits: counted.hits, endsAt: new Date(counted.windowStart.getTime() + windowS * 1000) };
}

/** Takes an attempt back, as one that succeeded. */
export async function uncountAttempt(tx: Transaction, key: string, windowS: number): Promise<void> {
  await tx.sql
    .update(rateCounter)
    .set({ hits: sql`greatest(${rateCounter.hits} - 1, 0)` })
    .where(and(eq(rateCounter.key, key), eq(rateCounter.windowStart, windowOf(windowS))));
}

export async function forgetAttempts(tx: Transaction, key: string): Promise<void> {
  await tx.sql.delete(rateCounter).where(eq(rateCounter.key, key));
}

/** Removes the windows that began more than a day ago. */
export async function removeOldCounters(tx: Transaction): Promise<void> {
  await tx.sql.delete(rateCounter).where(lt(rateCounter.windowStart, sql`now() - interval '1 day'`));
}

const windowOf = (windowS: number) =>
  sql`to_timestamp(floor(extract(epoch from now()) / ${windowS}) * ${windowS})`;
