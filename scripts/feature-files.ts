/** The files of a new feature, by path: a list of named things that the people of a firm can read. */
export function featureFiles(name: string): Record<string, string> {
  const words: Record<string, string> = {
    __name__: name,
    __camel__: camel(name),
    __Pascal__: pascal(name),
    __table__: name.replaceAll('-', '_'),
    __Words__: sentence(name),
  };
  const fill = (text: string): string =>
    Object.entries(words).reduce((filled, [key, value]) => filled.replaceAll(key, value), text);
  return Object.fromEntries(Object.entries(templates).map(([file, text]) => [fill(file), fill(text)]));
}

function pascal(name: string): string {
  return name.replace(/(?:^|-)([a-z])/g, (_match, letter: string) => letter.toUpperCase());
}

function camel(name: string): string {
  return name.replace(/-([a-z])/g, (_match, letter: string) => letter.toUpperCase());
}

function sentence(name: string): string {
  const spaced = name.replaceAll('-', ' ');
  return spaced.charAt(0).toUpperCase() + spaced.slice(1);
}

const templates: Record<string, string> = {
  'packages/contract/src/routes/__name__.ts': `import { z } from 'zod';
import { MEMBER, route } from '../route.ts';
import { empty, firmParams, name, none } from './common.ts';

export const __camel__View = z.strictObject({ id: z.uuid(), name });

export const list__Pascal__ = route({
  name: 'list__Pascal__',
  method: 'GET',
  path: '/api/firms/:firm/__name__',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: firmParams,
  query: none,
  body: empty,
  response: z.strictObject({ rows: z.array(__camel__View) }),
  errors: ['not_found'],
});
`,
  'packages/db/src/schema/__name__.ts': `import { check, pgTable, primaryKey, text } from 'drizzle-orm/pg-core';
import { sql } from 'drizzle-orm';
import { createdAt, firmId, rowId } from './columns.ts';
import { firm } from './firm.ts';

export const __camel__ = pgTable(
  '__table__',
  {
    firmId: firmId().references(() => firm.id, { onDelete: 'restrict' }),
    id: rowId(),
    name: text('name').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ name: '__table___pkey', columns: [t.firmId, t.id] }),
    check('__table___name_check', sql\`char_length(\${t.name}) between 1 and 200\`),
  ],
);
`,
  'packages/db/src/queries/__name__.ts': `import { asc, eq } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { __camel__ } from '../schema/__name__.ts';

export function list__Pascal__Rows(tx: FirmTransaction): Promise<{ id: string; name: string }[]> {
  return tx.sql
    .select({ id: __camel__.id, name: __camel__.name })
    .from(__camel__)
    .where(eq(__camel__.firmId, tx.firmId))
    .orderBy(asc(__camel__.name), asc(__camel__.id));
}
`,
  'apps/api/src/features/__name__/__name__-routes.ts': `import { list__Pascal__ } from '@farlug/contract/routes';
import type { Frame } from '../../http/frame.ts';
import { rowsOf__Pascal__ } from './__name__-service.ts';

export function register__Pascal__({ deps, mount }: Frame): void {
  mount(list__Pascal__, async ({ member }) => ({ rows: await rowsOf__Pascal__(deps, member) }));
}
`,
  'apps/api/src/features/__name__/__name__-service.ts': `import { list__Pascal__Rows } from '@farlug/db';
import type { Deps } from '../../deps.ts';
import type { Member } from '../../platform/caller.ts';
import { mayRead__Pascal__ } from './__name__-policy.ts';

export async function rowsOf__Pascal__(deps: Deps, member: Member): Promise<{ id: string; name: string }[]> {
  if (!mayRead__Pascal__(member.role)) return [];
  return deps.db.withFirm(member.firmId, member.person.id, list__Pascal__Rows);
}
`,
  'apps/api/src/features/__name__/__name__-policy.ts': `import type { FirmRole } from '@farlug/contract/route';

export function mayRead__Pascal__(role: FirmRole): boolean {
  return role === 'admin' || role === 'contractor' || role === 'estimator';
}
`,
  'apps/api/src/features/__name__/__name__-policy.test.ts': `import { FIRM_ROLES } from '@farlug/contract/route';
import { expect, it } from 'vitest';
import { mayRead__Pascal__ } from './__name__-policy.ts';

it.each(FIRM_ROLES)('lets a member who is %s read', (role) => {
  expect(mayRead__Pascal__(role)).toBe(true);
});
`,
  'apps/web/src/features/__name__/hooks/use-__name__.ts': `import { list__Pascal__ } from '@farlug/contract/routes';
import { type UseQueryResult, useQuery } from '@tanstack/react-query';
import { ask } from '../../../lib/call.ts';

export function use__Pascal__(firm: string): UseQueryResult<{ id: string; name: string }[]> {
  return useQuery({
    queryKey: ['firm', firm, '__name__'],
    queryFn: async ({ signal }) => (await ask(list__Pascal__, { params: { firm }, signal })).rows,
  });
}
`,
  'apps/web/src/features/__name__/components/__name__-list.tsx': `import { EmptyState } from '../../../ui/empty-state.tsx';
import { use__Pascal__ } from '../hooks/use-__name__.ts';

export function __Pascal__List({ firm }: { firm: string }) {
  const { data = [] } = use__Pascal__(firm);
  if (data.length === 0) return <EmptyState title="__Words__">There is nothing here yet.</EmptyState>;
  return (
    <ul aria-label="__Words__">
      {data.map(({ id, name }) => (
        <li key={id}>{name}</li>
      ))}
    </ul>
  );
}
`,
};
