import { JOB_TABLE_NAMES, JOB_TABLES } from '@farlug/contract/rows';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { z } from 'zod';
import { STORED_TABLES } from '../src/job-tables.ts';
import { type TestDatabase, withTestDatabase } from '../src/testing/index.ts';
import { fillEveryTable } from './every-table.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await withTestDatabase();
  await fillEveryTable(database);
  // Tries a value in every row and takes it back; whatever goes wrong beside checks and nulls is an error.
  await database.asOwner(`create function can_set(in_table text, in_column text, value text) returns boolean
    language plpgsql as $$
    begin
      execute format('update %I set %I = %L', in_table, in_column, value);
      raise exception using errcode = 'ZZ001';
    exception
      when check_violation or not_null_violation then return false;
      when sqlstate 'ZZ001' then return true;
    end $$`);
});
afterAll(() => database.close());

const CANDIDATES: Record<string, readonly unknown[]> = {
  text: ['nonsense', '', 'x'.repeat(5000), '1e5', '12 ft', '-0.5', '5 hp', 'L1-N', 'copper', '1', null],
  integer: [-1, 0, 1, 3, 4, 50, 51, 200, 201, 250, 251, null],
  boolean: [true, false, null],
  ARRAY: [[], ['L1'], ['L4'], ['N', 'L1'], ['L1', 'L2', 'L3', 'N', 'N'], null],
};
const literal = (value: unknown) =>
  Array.isArray(value) ? `{${value.join(',')}}` : value === null ? null : String(value);

describe.each(JOB_TABLE_NAMES)('%s takes in the database what it takes in the contract', (table) => {
  const { name, fields } = STORED_TABLES[table];
  const shape: Record<string, z.ZodType> = JOB_TABLES[table].shape;
  const own = fields.filter(({ field }) => !/^id$|Id$/.test(field));

  test.each(own)('$field', async ({ field, column }) => {
    const [found] = await database.asOwner(
      `select data_type from information_schema.columns where table_name = $1 and column_name = $2`,
      [name, column],
    );
    const values = CANDIDATES[String(found?.data_type)]!;
    const taken = await database.asOwner(
      `select can_set($1, $2, value) as can from unnest($3::text[]) with ordinality as v (value, i) order by i`,
      [name, column, values.map(literal)],
    );
    const allowed = values.map((value) => shape[field]!.safeParse(value).success);
    expect(values.map((value, i) => [value, taken[i]?.can])).toEqual(
      values.map((value, i) => [value, allowed[i]]),
    );
    expect(allowed).toContain(false);
  });
});
