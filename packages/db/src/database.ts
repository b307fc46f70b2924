import { sql } from 'drizzle-orm';
import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import pg from 'pg';

/** Runs one statement within the transaction; the shape that pg-boss takes a caller's transaction in. */
export interface SqlExecutor {
  executeSql(text: string, values?: unknown[]): Promise<{ rows: Record<string, unknown>[] }>;
}
export interface Transaction {
  sql: NodePgDatabase;
  executor: SqlExecutor;
}
/** A transaction that sees the rows of one firm and no others. */
export interface FirmTransaction extends Transaction {
  firmId: string;
  /** Who acts; null for the worker and for the holder of a link. */
  personId: string | null;
}

export interface Database {
  /** Everything that `run` does in one transaction, with the rows of this firm alone; rolled back when it throws. */
  withFirm<T>(firmId: string, personId: string | null, run: (tx: FirmTransaction) => Promise<T>): Promise<T>;
  /** One transaction on the tables that belong to no firm. */
  global<T>(run: (tx: Transaction) => Promise<T>): Promise<T>;
  /** True when the database answers. */
  ready(): Promise<boolean>;
  /** For the session store alone. */
  sessionPool: pg.Pool;
  close(): Promise<void>;
}

export function createDatabase(url: string, { connections = 10 }: { connections?: number } = {}): Database {
  const pool = new pg.Pool({ connectionString: url, max: connections });
  // A connection that breaks while idle is replaced by the pool; the next query tells whether the database is there.
  pool.on('error', () => {});

  async function transaction<T>(run: (tx: Transaction) => Promise<T>): Promise<T> {
    const client = await pool.connect();
    let broken: Error | undefined;
    const onBreak = (error: Error) => {
      broken = error;
    };
    // The query that was under way fails by itself; without a listener the whole process would end.
    client.on('error', onBreak);
    try {
      await client.query('begin');
      const executeSql: SqlExecutor['executeSql'] = (text, values) => client.query(text, values);
      const result = await run({ sql: drizzle({ client }), executor: { executeSql } });
      await client.query('commit');
      return result;
    } catch (error) {
      await client.query('rollback').catch(onBreak);
      throw error;
    } finally {
      client.off('error', onBreak);
      client.release(broken);
    }
  }

  return {
    withFirm: (firmId, personId, run) =>
      transaction(async (tx) => {
        await tx.sql.execute(sql`select set_config('farlug.firm', ${firmId}, true)`);
        return run({ ...tx, firmId, personId });
      }),
    global: transaction,
    ready: () =>
      pool.query('select 1').then(
        () => true,
        () => false,
      ),
    sessionPool: pool,
    close: () => pool.end(),
  };
}
