import { mkdirSync, mkdtempSync, realpathSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import config, { unreachable } from '../../.dependency-cruiser.mjs';
import { checkBoundaries } from './boundaries.ts';

let directory: string;
beforeEach(() => {
  directory = realpathSync(mkdtempSync(path.join(tmpdir(), 'farlug-boundaries-')));
});
afterEach(() => rmSync(directory, { recursive: true, force: true }));

/** A project in which each file imports what stands beside it; files that are only imported are made too. */
async function failing(imports: Record<string, string[]>, kind: '' | 'type ' = ''): Promise<string[]> {
  const files = new Map<string, string>([
    [
      'package.json',
      '{"dependencies":{"mathjs":"1","pg":"1","react":"1","express":"1","passport":"1","nodemailer":"1"}}',
    ],
  ]);
  for (const name of ['mathjs', 'pg', 'react', 'express', 'passport', 'nodemailer', 'stray']) {
    files.set(`node_modules/${name}/package.json`, `{"name":"${name}","version":"1.0.0","main":"index.js"}`);
    files.set(`node_modules/${name}/index.js`, 'export const a = 1;');
  }
  for (const target of Object.values(imports).flat())
    if (/^(packages|apps)\//.test(target)) files.set(target, 'export const a = 1;');
  for (const [file, targets] of Object.entries(imports)) {
    files.set(
      file,
      `${targets.map((target, n) => statement(file, target, n, kind)).join('\n')}\nexport const a = 1;`,
    );
  }
  for (const folder of ['packages', 'apps', 'scripts']) mkdirSync(path.join(directory, folder));
  for (const [file, text] of files) {
    mkdirSync(path.dirname(path.join(directory, file)), { recursive: true });
    writeFileSync(path.join(directory, file), text);
  }
  const checks = await checkBoundaries(directory, ['packages', 'apps', 'scripts']);
  return checks.filter(({ failed }) => failed > 0).map(({ name }) => name);
}

function statement(from: string, target: string, n: number, kind: string): string {
  const relative = path.relative(path.dirname(from), target);
  const specifier = /^(packages|apps)\//.test(target)
    ? relative.startsWith('.')
      ? relative
      : `./${relative}`
    : target;
  const use = kind === '' ? `export const b${n} = a${n};` : `export type B${n} = typeof a${n};`;
  return `import ${kind}{ a as a${n} } from '${specifier}';\n${use}`;
}

const sample = 'packages/solver/src/judge/verdict.ts';
const feature = 'apps/api/src/features/jobs';

const samples: [rule: string, from: string, to: string][] = [
  ['solver-stands-alone', sample, 'packages/contract/src/route.ts'],
  ['solver-does-no-input-or-output', sample, 'node:fs'],
  ['contract-knows-the-job-only', 'packages/contract/src/route.ts', sample],
  ['contract-below-db-and-apps', 'packages/contract/src/route.ts', 'packages/db/src/index.ts'],
  ['db-below-apps', 'packages/db/src/index.ts', 'apps/api/src/config.ts'],
  ['api-without-web', 'apps/api/src/app.ts', 'apps/web/src/lib/a.ts'],
  ['web-without-server', 'apps/web/src/lib/a.ts', 'packages/db/src/index.ts'],
  ['packages-only-by-their-exports', 'apps/web/src/lib/a.ts', 'packages/solver/bench/network.ts'],
  ['sql-only-in-db', 'apps/api/src/app.ts', 'pg'],
  ['mathjs-only-where-numbers-are', 'packages/contract/src/route.ts', 'mathjs'],
  ['react-only-in-pages-and-pdf', 'apps/api/src/app.ts', 'react'],
  ['express-only-in-routes', `${feature}/jobs-service.ts`, 'express'],
  ['passport-only-in-auth', 'apps/api/src/http/a.ts', 'passport'],
  ['mail-only-in-its-adapter', 'apps/api/src/http/a.ts', 'nodemailer'],
  ['routes-call-services', `${feature}/jobs-routes.ts`, 'packages/db/src/index.ts'],
  ['services-below-routes', `${feature}/jobs-service.ts`, `${feature}/jobs-routes.ts`],
  ['policy-decides-only', `${feature}/jobs-policy.ts`, 'packages/db/src/index.ts'],
  [
    'features-of-the-api-meet-in-services',
    `${feature}/jobs-service.ts`,
    'apps/api/src/features/firm/firm-policy.ts',
  ],
  ['a-feature-never-imports-another', 'apps/web/src/features/jobs/a.ts', 'apps/web/src/features/firm/b.ts'],
  ['ui-and-lib-know-nothing', 'apps/web/src/ui/a.ts', 'apps/web/src/job/b.ts'],
  ['job-below-features', 'apps/web/src/job/a.ts', 'apps/web/src/features/firm/b.ts'],
  ['features-below-routes', 'apps/web/src/features/jobs/a.ts', 'apps/web/src/routes/b.ts'],
  ['routes-below-the-app', 'apps/web/src/routes/a.ts', 'apps/web/src/app/router.ts'],
  ['resolvable', sample, 'packages/solver/src/../../../gone.ts'],
  ['tests-are-leaves', 'apps/api/src/app.ts', 'packages/db/src/testing/database.ts'],
  ['declared-where-used', sample, 'stray'],
  ['contract-never-loads-mathjs', 'packages/contract/src/route.ts', 'mathjs'],
  ['first-page-never-loads-mathjs', 'apps/web/src/main.tsx', 'mathjs'],
];

it.each(samples)('%s is broken by %s importing %s', async (rule, from, to) => {
  const target = to.includes('gone') ? './gone.ts' : to;
  expect(await failing({ [from]: [target] })).toContain(rule);
});

it('every rule has a sample that breaks it', () => {
  const rules = [...(config.forbidden ?? []), ...unreachable].map(({ name }) => name);
  expect(new Set([...samples.map(([rule]) => rule), 'no-circle'])).toEqual(new Set(rules));
});

it('no-circle is broken by two files that import each other', async () => {
  const [a, b] = ['packages/solver/src/judge/a.ts', 'packages/solver/src/judge/b.ts'];
  expect(await failing({ [a]: [b], [b]: [a] })).toEqual(['no-circle']);
});

it('a way around through other files still reaches', async () => {
  const [main, between] = ['apps/web/src/main.tsx', 'packages/solver/src/units/format.ts'];
  expect(await failing({ [main]: [between], [between]: ['mathjs'] })).toEqual([
    'first-page-never-loads-mathjs',
  ]);
});

it('a type is not loaded, and so does not reach', async () => {
  const [main, between] = ['apps/web/src/main.tsx', 'packages/solver/src/units/format.ts'];
  expect(await failing({ [main]: [between], [between]: ['mathjs'] }, 'type ')).toEqual([]);
});

it('nothing is broken by the arrows as they are meant', async () => {
  const found = await failing({
    'apps/web/src/features/jobs/a.ts': ['apps/web/src/ui/b.ts', 'apps/web/src/app/paths.ts'],
    'apps/api/src/features/jobs/jobs-service.ts': ['packages/db/src/index.ts', sample],
    [sample]: ['mathjs'],
  });
  expect(found).toEqual([]);
});

it('seeing no module is a failure by itself', async () => {
  expect(await failing({})).toEqual(['modules were seen']);
});
