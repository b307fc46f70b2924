import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-audits.ts';

it('finds an audit without a test', () => {
  const found = audit.find(
    treeOf({ 'scripts/check-a.ts': '', 'scripts/check-b.ts': '', 'scripts/check-b.test.ts': '' }),
  );
  expect(found).toEqual(['scripts/check-a.ts: it has no test beside it that proves that it can fail']);
  expect(audit.find(treeOf({}))).toHaveLength(1);
});
