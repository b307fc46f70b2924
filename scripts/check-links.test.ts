import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-links.ts';

it('finds a link to a missing file and to a missing heading', () => {
  const found = audit.find(
    treeOf({
      'README.md': '[a](DEVELOPERS.md) [b](docs/gone.md) [c](DEVELOPERS.md#no-such) ![d](docs/)',
      'DEVELOPERS.md': '# Set up',
      'docs/decisions/0001-first.md': '[up](../../README.md) [set up](../../DEVELOPERS.md#set-up)',
    }),
  );
  expect(found).toEqual([
    'README.md: (docs/gone.md): nothing stands at docs/gone.md',
    'README.md: (DEVELOPERS.md#no-such): DEVELOPERS.md has no heading for #no-such',
  ]);
});
