import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, expect, test } from 'vitest';
import { AssumedMark } from './assumed-mark.tsx';
import { DropBar } from './drop-bar.tsx';
import { VERDICT_KINDS, VERDICT_WORDS } from './glyph.tsx';
import { MissingBox } from './missing-box.tsx';
import { Tally, Verdict, VerdictFigure } from './verdict.tsx';

afterEach(cleanup);

test('every verdict has a glyph of its own and a word, never colour alone', () => {
  const { container } = render(
    VERDICT_KINDS.map((kind) => (
      <p key={kind}>
        <Verdict kind={kind} />
      </p>
    )),
  );
  const shapes = [...container.querySelectorAll('svg')].map((svg) => svg.innerHTML);
  expect(new Set(shapes).size).toBe(VERDICT_KINDS.length);
  for (const kind of VERDICT_KINDS) expect(screen.getByText(VERDICT_WORDS[kind])).toBeTruthy();
});

test('a figure in a tight place keeps the word for those who listen', () => {
  render(<VerdictFigure kind="over">6.71</VerdictFigure>);
  expect(screen.getByText('6.71').textContent).toBe('6.71 over');
});

test('the tally always says how many are over, and leaves out kinds without any', () => {
  render(<Tally counts={{ over: 0, near: 8, within: 59, unjudged: 0 }} words={{ unjudged: 'left out' }} />);
  expect(screen.getAllByRole('listitem').map((item) => item.textContent)).toEqual([
    '0 over',
    '8 near',
    '59 within',
  ]);
});

test('a drop bar is drawn to scale and read aloud', () => {
  const { container } = render(
    <DropBar feederPercent={2.5} branchPercent={3.5} limitPercent={5} scalePercent={8} />,
  );
  expect(screen.getByRole('img', { name: 'feeder 2.50, branch 3.50, limit 5' })).toBeTruthy();
  const widths = [...container.querySelectorAll('rect')].map((rect) => Number(rect.getAttribute('width')));
  expect(widths).toEqual([30, 30, 12]);
});

test('assumed and missing values say so to everybody', () => {
  render(
    <>
      <AssumedMark>16.0 A</AssumedMark>
      <MissingBox what="length" />
    </>,
  );
  expect(screen.getByTitle('assumed').textContent).toContain('16.0 A');
  expect(screen.getByTitle('assumed').textContent).toContain('assumed');
  expect(screen.getByText('length').textContent).toBe('length is missing');
});
