import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-tests.ts';

const find = (text: string): string[] => audit.find(treeOf({ 'packages/solver/src/sum.test.ts': text }));
const sound = "it('adds', () => expect(sum(1, 2)).toBe(3));";

it.each(['skip', 'only', 'todo', 'each.only'])('finds a test marked %s', (mark) => {
  expect(find(sound.replace('it(', `it.${mark}(`))).toHaveLength(1);
});

it('finds an expectation about a constant, a conditional test and one without expectation', () => {
  expect(find(`it('holds', () => expect(${'true'}).toBe(true));`)).toHaveLength(1);
  expect(find(sound.replace('it(', `it.${'runIf'}(linux)(`))).toHaveLength(1);
  expect(find("it('adds', () => sum(1, 2));")).toEqual([
    'packages/solver/src/sum.test.ts: it expects nothing',
  ]);
});

it('leaves a sound test alone', () => {
  expect(find(sound)).toEqual([]);
});
