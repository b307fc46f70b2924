import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-words.ts';

const find = (text: string): string[] => audit.find(treeOf({ 'README.md': text }));
const glued = (...parts: string[]): string => parts.join('');

it.each([
  glued('as the lec', 'ture says'),
  glued('a cour', 'se on wiring'),
  glued('see /wor', 'k/main/README.md'),
  glued('https://registry.n', 'pmjs.org/zod'),
  glued('// TO', 'DO later'),
  glued('closes iss', 'ue #4'),
  glued('throw new Error("not yet im', 'plemented")'),
])('finds %s', (text) => {
  expect(find(`fine\n${text}`)).toEqual([expect.stringMatching(/^README\.md:2: /)]);
});

it('leaves ordinary words alone', () => {
  expect(
    find('of course; in the course of a day; ./work/shop; a user agent; issues a report; ~/notes'),
  ).toEqual([]);
});
