import { CODE_FIELD, REFERENCES } from '@farlug/contract/edit';
import { JOB_TABLE_NAMES } from '@farlug/contract/rows';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { STORED_TABLES } from '../src/job-tables.ts';
import { GLOBAL_TABLES, QUEUE_TABLES, TENANT_TABLES } from '../src/tables.ts';
import { type TestDatabase, withTestDatabase } from '../src/testing/index.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await withTestDatabase();
});
afterAll(() => database.close());

test('every table of the database is in exactly one list', async () => {
  const rows = await database.asOwner(
    `select case when n.nspname = 'public' then c.relname else n.nspname || '.' || c.relname end as name
     from pg_class c join pg_namespace n on n.oid = c.relnamespace
     where c.relkind in ('r', 'p') and n.nspname not in ('pg_catalog', 'information_schema') order by 1`,
  );
  const listed = [...GLOBAL_TABLES, ...TENANT_TABLES, ...QUEUE_TABLES];
  expect(new Set(listed).size).toBe(listed.length);
  expect(rows.map((row) => row.name)).toEqual([...listed].sort());
});

describe.each(TENANT_TABLES)('tenant table %s', (table) => {
  test('has firm_id in its key, forced row-level security and its policy', async () => {
    const [found] = await database.asOwner(
      `select c.relrowsecurity, c.relforcerowsecurity,
         (select array_agg(a.attname::text) from pg_index i join pg_attribute a
            on a.attrelid = c.oid and a.attnum = any(i.indkey) where i.indrelid = c.oid and i.indisprimary) as key,
         (select array_agg(pg_get_expr(p.polqual, c.oid)) from pg_policy p
            where p.polrelid = c.oid and p.polname = 'own_firm' and p.polcmd = '*' and p.polroles = '{0}') as policy,
         (select count(*)::int from pg_policy p where p.polrelid = c.oid and p.polname <> 'own_firm'
            and p.polroles <> array[c.relowner]) as others
       from pg_class c where c.oid = $1::regclass`,
      [`public.${table}`],
    );
    expect(found).toMatchObject({ relrowsecurity: true, relforcerowsecurity: true, others: 0 });
    expect(found?.key).toContain('firm_id');
    expect(found?.policy).toEqual([expect.stringContaining("current_setting('farlug.firm'::text, true)")]);
  });

  test('refers to rows of firms by their firm_id', async () => {
    const keys = await database.asOwner(
      `select k.conname, pg_get_constraintdef(k.oid) as definition, k.confrelid::regclass::text as target
       from pg_constraint k where k.conrelid = $1::regclass and k.contype = 'f'`,
      [`public.${table}`],
    );
    for (const { definition, target } of keys)
      if ((TENANT_TABLES as readonly string[]).includes(String(target).replaceAll('"', '')))
        expect(definition).toMatch(/^FOREIGN KEY \(firm_id\b/);
  });
});

describe.each(JOB_TABLE_NAMES.filter((table) => table !== 'job'))('rows of %s', (table) => {
  const stored = STORED_TABLES[table];
  const constraints = async (type: string) =>
    (
      await database.asOwner(
        `select conname as name, pg_get_constraintdef(oid) as definition, condeferred as deferred
         from pg_constraint where conrelid = $1::regclass and contype = $2`,
        [`public.${stored.name}`, type],
      )
    ).map((row) => row as { name: string; definition: string; deferred: boolean });

  test('have the key of firm, job and row', async () => {
    expect((await constraints('p')).map((key) => key.definition)).toEqual([
      'PRIMARY KEY (firm_id, job_id, id)',
    ]);
  });

  test('refer to exactly what the contract says, within the job, and hold it there', async () => {
    const columnOf = (field: string) => stored.fields.find((candidate) => candidate.field === field)!.column;
    const expected = Object.entries(REFERENCES[table] ?? {}).map(
      ([field, target]) =>
        `FOREIGN KEY (firm_id, job_id, ${columnOf(field)}) REFERENCES ${STORED_TABLES[target].name}(firm_id, job_id, id) ON DELETE RESTRICT`,
    );
    const found = (await constraints('f')).map((key) => key.definition);
    expect(found.sort()).toEqual(
      [...expected, 'FOREIGN KEY (firm_id, job_id) REFERENCES job(firm_id, id) ON DELETE RESTRICT'].sort(),
    );
  });

  test('have a unique code that may change hands within an edit', async () => {
    const field = CODE_FIELD[table];
    const unique = await constraints('u');
    if (field === undefined) expect(unique).toEqual([]);
    else
      expect(unique).toEqual([
        {
          name: `${stored.name}_${field}_key`,
          definition: `UNIQUE (firm_id, job_id, ${field}) DEFERRABLE INITIALLY DEFERRED`,
          deferred: true,
        },
      ]);
  });
});

test('every index but those of keys says which question it serves', async () => {
  const silent = await database.asOwner(
    `select c.relname from pg_index i join pg_class c on c.oid = i.indexrelid
     where c.relnamespace = 'public'::regnamespace and obj_description(c.oid, 'pg_class') is null
       and not exists (select 1 from pg_constraint k where k.conindid = c.oid)`,
  );
  expect(silent).toEqual([]);
});

test('every foreign key says what a deletion does, and points are in time zones', async () => {
  const silent = await database.asOwner(
    `select conname from pg_constraint
     where contype = 'f' and connamespace = 'public'::regnamespace and confdeltype = 'a'`,
  );
  expect(silent).toEqual([]);
  const zoneless = await database.asOwner(
    `select table_name, column_name from information_schema.columns
     where table_schema = 'public' and data_type = 'timestamp without time zone' and table_name <> 'session'`,
  );
  expect(zoneless).toEqual([]);
});

test('functions that look across firms have a fixed search path and are open to named roles only', async () => {
  const functions = await database.asOwner(
    `select proname, proconfig, array_to_string(proacl, ' ') as acl from pg_proc
     where prosecdef and pronamespace = 'public'::regnamespace order by proname`,
  );
  expect(functions.map((row) => row.proname)).toEqual([
    'deliveries_left_sending',
    'delivery_of_link',
    'invitation_of_token',
    'memberships_of',
  ]);
  for (const { proconfig, acl } of functions) {
    expect(proconfig).toEqual(['search_path=pg_catalog, pg_temp']);
    expect(acl).not.toMatch(/(^| )=X/);
  }
});
