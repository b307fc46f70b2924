import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-catalog.ts';

const sound = {
  'package.json': '{"devDependencies":{"zod":"catalog:","@farlug/solver":"workspace:*"}}',
  'pnpm-workspace.yaml': "packages:\n  - apps/*\n\ncatalog:\n  '@types/pg': 8.23.1\n  zod: 4.6.7\n",
  'pnpm-lock.yaml': "lockfileVersion: '9.0'\n",
};

it('accepts exact versions in one catalog', () => {
  expect(audit.find(treeOf(sound))).toEqual([]);
});

it.each([
  ['a version in a package', { 'package.json': '{"dependencies":{"zod":"4.6.7"}}' }],
  ['a range in the catalog', { 'pnpm-workspace.yaml': 'catalog:\n  zod: ^4.6.7\n' }],
  ['an empty catalog', { 'pnpm-workspace.yaml': 'packages:\n  - apps/*\n' }],
  [
    'a host in the lockfile',
    { 'pnpm-lock.yaml': 'resolution: {tarball: https://packages.example/zod.tgz}\n' },
  ],
])('finds %s', (_what, change) => {
  expect(audit.find(treeOf({ ...sound, ...change }))).toHaveLength(1);
});
