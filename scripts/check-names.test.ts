import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-names.ts';

const find = (file: string): string[] => audit.find(treeOf({ [file]: '' }));

it.each([
  'apps/web/src/ui/DropBar.tsx',
  'packages/solver/src/hand_check.ts',
  'apps/api/src/utils/date.ts',
  'apps/api/src/helpers.ts',
])('finds %s', (file) => expect(find(file)).toHaveLength(1));

it.each([
  'apps/web/src/ui/drop-bar.test.tsx',
  'README.md',
  '.ci/run',
  'docker/Dockerfile',
  '.dependency-cruiser.mjs',
  'docs/decisions/0001-a-b.md',
])('accepts %s', (file) => expect(find(file)).toEqual([]));
