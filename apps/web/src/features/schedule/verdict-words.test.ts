import { expect, test } from 'vitest';
import { problemWords } from './problem-words.ts';
import { forceSentence, verdictSentence } from './verdict-words.ts';

test('a verdict is a sentence: its word, then the reasons', () => {
  expect(verdictSentence('over', ['branch 3.36 % > 3 %', 'total 5.45 % > 5 %'], '5.45 %', '5 %')).toEqual({
    lead: 'Over.',
    rest: 'Branch 3.36 % against 3 %, total 5.45 % against 5 %.',
  });
  expect(verdictSentence('within', [], '2.10 %', '5 %').rest).toBe('Total 2.10 % against 5 %.');
  expect(verdictSentence('unjudged', [], '2.10 %', null).rest).toBe('No limit is set for it.');
});

test('a recommendation that is missed is told apart from a mandatory limit', () => {
  expect(forceSentence('over', 'recommendation', 'NEC notes')).toMatch(/not a violation by itself/);
  expect(forceSentence('over', 'mandatory', 'the energy code')).toMatch(/makes mandatory/);
  expect(forceSentence('within', 'mandatory', null)).toBeNull();
});

test('a problem follows the name of its field', () => {
  expect(problemWords('Length', 'must be a length such as 120 ft')).toBe(
    'Length must be a length such as 120 ft.',
  );
  expect(problemWords('Spaces', 'Spaces 3 and 5 are taken.')).toBe('Spaces 3 and 5 are taken.');
});
