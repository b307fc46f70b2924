import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-decisions.ts';

const sound =
  '# 1. Keep it small\n\n- Date: 2026-12-01\n- Status: accepted\n\n## Context\nx\n## Decision\nx\n## Consequences\nx\n';

it('accepts a whole record', () => {
  expect(audit.find(treeOf({ 'docs/decisions/0001-keep-it-small.md': sound }))).toEqual([]);
});

it.each([
  ['a gap in the numbers', '0002-keep-it-small.md', sound.replace('# 1.', '# 2.')],
  ['a missing date', '0001-keep-it-small.md', sound.replace('- Date', '- Day')],
  ['an unknown status', '0001-keep-it-small.md', sound.replace('accepted', 'maybe')],
  ['a missing section', '0001-keep-it-small.md', sound.replace('## Context\nx\n', '')],
  ['another name', '1-Keep.md', sound],
])('finds %s', (_what, file, text) => {
  expect(audit.find(treeOf({ [`docs/decisions/${file}`]: text }))).toHaveLength(1);
});

it('finds that there is none', () => {
  expect(audit.find(treeOf({}))).toHaveLength(1);
});
