import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-file-length.ts';

const linesOf = (count: number): string => 'x;\n'.repeat(count);

it('finds a file over 400 lines, and over 500 among numerical ones and tests', () => {
  const found = audit.find(
    treeOf({
      'apps/api/src/long.ts': linesOf(401),
      'apps/api/src/right.ts': linesOf(400),
      'packages/solver/src/linear/factor.ts': linesOf(500),
      'packages/solver/src/linear/long.ts': linesOf(501),
      'packages/solver/test/cases.ts': linesOf(501),
      'packages/solver/src/tables/data/ampacity.ts': linesOf(900),
    }),
  );
  expect(found).toEqual([
    'apps/api/src/long.ts: 401 lines, at most 400: split it',
    'packages/solver/src/linear/long.ts: 501 lines, at most 500: split it',
    'packages/solver/test/cases.ts: 501 lines, at most 500: split it',
  ]);
});
