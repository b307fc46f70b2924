import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { cellContexts } from '../cell-contexts.ts';
import { RESULT_COLUMNS } from '../columns.ts';
import type { TypedCell } from '../grid-block.ts';
import { openDemoRows, panelOf } from '../testing/open-demo.ts';
import { ScheduleGrid } from './schedule-grid.tsx';

afterEach(cleanup);

const panel = panelOf(openDemoRows(), 'LP-2');
const COLUMN = Object.fromEntries(RESULT_COLUMNS.map(({ key }, i) => [key, i]));
let typed: TypedCell[][];
let said: string[];
beforeEach(() => {
  typed = [];
  said = [];
});

function show(more: Partial<Parameters<typeof ScheduleGrid>[0]> = {}) {
  render(
    <ScheduleGrid
      label="Circuits of LP-2"
      columns={RESULT_COLUMNS}
      rows={cellContexts(panel, null)}
      chosenId={null}
      readOnly={false}
      initial={{ circuitId: panel.circuits[1]!.id, field: 'length' }}
      onChoose={(id) => said.push(`choose ${id}`)}
      onType={(cells) => {
        typed.push([...cells]);
        return null;
      }}
      onAdd={() => said.push('add')}
      onDuplicate={(id) => said.push(`duplicate ${id}`)}
      onRemove={(id) => said.push(`remove ${id}`)}
      {...more}
    />,
  );
}
const here = () => document.activeElement!;
const place = () => (here() as HTMLElement).dataset.cell;
const key = (name: string, more: object = {}) => fireEvent.keyDown(here(), { key: name, ...more });
const id = (row: number) => panel.circuits[row]!.id;

test('one cell has the focus; arrows, Home, End and Ctrl move it', () => {
  show();
  expect(place()).toBe(`1:${COLUMN.length}`);
  expect(screen.getAllByRole('gridcell').filter((cell) => cell.tabIndex === 0)).toHaveLength(1);
  key('ArrowDown');
  key('ArrowRight');
  expect(place()).toBe(`2:${COLUMN.load}`);
  key('Home');
  expect(place()).toBe('2:0');
  key('End');
  expect(place()).toBe(`2:${RESULT_COLUMNS.length - 1}`);
  key('Home', { ctrlKey: true });
  key('ArrowUp');
  expect(place()).toBe('0:0');
});

test('Enter opens with all of the text, Enter takes it and goes down', () => {
  show();
  key('Enter');
  const input = within(screen.getByRole('grid')).getByRole<HTMLInputElement>('textbox');
  expect(input.value).toBe('82 ft');
  fireEvent.change(input, { target: { value: '60' } });
  key('Enter');
  expect(typed).toEqual([[{ circuitId: id(1), field: 'length', text: '60' }]]);
  expect(place()).toBe(`2:${COLUMN.length}`);
});

test('typing opens with what was typed, Tab takes it and goes right, Esc leaves the cell as it was', () => {
  show();
  key('9');
  const input = screen.getByRole<HTMLInputElement>('textbox');
  expect(input.value).toBe('9');
  key('Tab');
  expect(typed).toEqual([[{ circuitId: id(1), field: 'length', text: '9' }]]);
  expect(place()).toBe(`1:${COLUMN.load}`);
  key('5');
  key('Escape');
  expect(typed).toHaveLength(1);
  expect(screen.queryByRole('textbox')).toBeNull();
  expect(place()).toBe(`1:${COLUMN.load}`);
});

test('a cell that is left by a click takes what was typed; one opened and left alone writes nothing', () => {
  show();
  key('7');
  fireEvent.blur(screen.getByRole('textbox'));
  expect(typed).toEqual([[{ circuitId: id(1), field: 'length', text: '7' }]]);
  key('F2');
  fireEvent.blur(screen.getByRole('textbox'));
  expect(typed).toHaveLength(1);
});

test('fill down, delete, paste and the keys of whole rows', () => {
  show();
  key('d', { ctrlKey: true });
  key('Delete');
  const clipboardData = { getData: () => '10 ft\t4 A\n20 ft\t5 A' };
  fireEvent.paste(here(), { clipboardData });
  expect(typed).toEqual([
    [{ circuitId: id(1), field: 'length', text: '48 ft' }],
    [{ circuitId: id(1), field: 'length', text: '' }],
    [
      { circuitId: id(1), field: 'length', text: '10 ft' },
      { circuitId: id(1), field: 'load', text: '4 A' },
      { circuitId: id(2), field: 'length', text: '20 ft' },
      { circuitId: id(2), field: 'load', text: '5 A' },
    ],
  ]);
  key('Insert');
  key('D', { ctrlKey: true, shiftKey: true });
  key('Delete', { shiftKey: true });
  key(' ');
  expect(said).toEqual(['add', `duplicate ${id(1)}`, `remove ${id(1)}`, `choose ${id(1)}`]);
});

test('while a row is shown at the side, moving to another row shows that one', () => {
  show({ chosenId: id(1) });
  key('ArrowDown');
  key('ArrowRight');
  expect(said).toEqual([`choose ${id(2)}`, `choose ${id(2)}`]);
});

test('computed cells and archived jobs take nothing', () => {
  show({ readOnly: true });
  key('Enter');
  key('5');
  key('Delete');
  key('Insert');
  expect(screen.queryByRole('textbox')).toBeNull();
  expect([typed, said]).toEqual([[], []]);
});
