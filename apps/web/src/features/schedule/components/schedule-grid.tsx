import { type ClipboardEvent, type KeyboardEvent, useEffect, useRef, useState } from 'react';
import { cx } from '../../../ui/cx.ts';
import { Scroller } from '../../../ui/scroller.tsx';
import type { GridColumn } from '../columns.ts';
import { placeBlock, readBlock, type TypedCell } from '../grid-block.ts';
import { moveBy } from '../grid-moves.ts';
import { problemWords } from '../problem-words.ts';
import { CellEditor } from './cell-editor.tsx';
import { type CellContext, CircuitCell } from './circuit-cell.tsx';
import { GridCell } from './grid-cell.tsx';

interface ScheduleGridProps {
  label: string;
  columns: readonly GridColumn[];
  rows: readonly CellContext[];
  chosenId: string | null;
  readOnly: boolean;
  /** A cell that takes the focus when the grid appears. */
  initial?: { circuitId: string; field: string | null } | null;
  onChoose: (circuitId: string) => void;
  /** Takes what was typed into cells, as one step; what was not understood comes back in words. */
  onType: (cells: readonly TypedCell[]) => string | null;
  onAdd: () => void;
  onDuplicate: (circuitId: string) => void;
  onRemove: (circuitId: string) => void;
}

interface Place {
  row: number;
  column: number;
}

/**
 * The rows of a panel as a grid (WAI-ARIA grid pattern): one cell has the focus, arrows move it, Enter, F2 or typing
 * opens it, Esc leaves it as it was, Tab and Enter take what was typed and go on.
 */
export function ScheduleGrid(props: ScheduleGridProps) {
  const { label, columns, rows, chosenId, readOnly, initial, onChoose, onType } = props;
  const [at, setAt] = useState<Place>(() => placeOf(initial, rows, columns));
  const [editing, setEditing] = useState<{ text: string; caret: 'all' | 'end' } | null>(null);
  const [problem, setProblem] = useState<{ id: string; key: string; text: string } | null>(null);
  const table = useRef<HTMLTableElement>(null);
  const wantsFocus = useRef(Boolean(initial));
  const row = Math.min(at.row, Math.max(rows.length - 1, 0));
  const column = Math.min(at.column, columns.length - 1);
  const circuit = rows[row]?.circuit;
  const field = columns[column]!.field;

  // The focus follows the place only after a key or a click in the grid: a result that arrives moves nothing.
  useEffect(() => {
    if (!wantsFocus.current || editing) return;
    wantsFocus.current = false;
    const cell = table.current?.querySelector<HTMLElement>(`[data-cell="${row}:${column}"]`);
    cell?.focus({ preventScroll: true });
    cell?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  });

  const go = (place: Place) => {
    wantsFocus.current = true;
    setAt(place);
    const next = rows[place.row]?.circuit.id;
    if (chosenId !== null && next !== undefined && next !== chosenId) onChoose(next);
  };
  const open = (text: string | null) => {
    if (!field || !circuit || readOnly) return;
    setEditing(text === null ? { text: circuit.fields[field].text, caret: 'all' } : { text, caret: 'end' });
  };
  const type = (cells: readonly TypedCell[]) => {
    const [first] = cells;
    if (!first || readOnly) return;
    const refused = onType(cells);
    const { key, label: word } = columns[column]!;
    setProblem(refused === null ? null : { id: first.circuitId, key, text: problemWords(word, refused) });
  };
  const typeHere = (text: string) => circuit && field && type([{ circuitId: circuit.id, field, text }]);
  const take = (text: string, then: Place) => {
    if (text !== circuit?.fields[field!].text) typeHere(text);
    setEditing(null);
    go(then);
  };
  const leave = () => {
    setEditing(null);
    go({ row, column });
  };
  const fillDown = () => {
    const above = rows[row - 1]?.circuit;
    if (above && field) typeHere(above.fields[field].text);
  };

  // Only as long as the text that was not understood stands in the cell.
  const wrongIn = ({ circuit: { id, fields } }: CellContext, { key, field: typed }: GridColumn) =>
    problem?.id === id && problem.key === key && typed && fields[typed].draft ? problem.text : null;

  const onKey = (event: KeyboardEvent) => {
    if (editing) return;
    const command = event.ctrlKey || event.metaKey;
    const key = command ? event.key.toLowerCase() : event.key;
    const moved = moveBy(event, { row, column }, rows.length, columns.length);
    if (moved) go(moved);
    else if (command && key === 'd' && event.shiftKey) circuit && !readOnly && props.onDuplicate(circuit.id);
    else if (command && key === 'd') fillDown();
    else if (key === 'Enter' || key === 'F2') open(null);
    else if (key === ' ') circuit && onChoose(circuit.id);
    else if (key === 'Insert') !readOnly && props.onAdd();
    else if (key === 'Delete' && event.shiftKey) circuit && !readOnly && props.onRemove(circuit.id);
    else if (key === 'Delete' || key === 'Backspace') typeHere('');
    else if (key.length === 1 && !command && !event.altKey && key !== '?') open(key);
    else return;
    event.preventDefault();
  };

  const onCopy = (event: ClipboardEvent) => {
    if (editing || !circuit || !field) return;
    event.clipboardData.setData('text/plain', circuit.fields[field].text);
    event.preventDefault();
    if (event.type === 'cut') typeHere('');
  };
  const onPaste = (event: ClipboardEvent) => {
    if (editing) return;
    event.preventDefault();
    const block = readBlock(event.clipboardData.getData('text/plain'));
    const ids = rows.map((one) => one.circuit.id);
    type(placeBlock(block, { row, column }, ids, columns));
  };

  return (
    <Scroller
      label={`${label}, scrolls`}
      className="min-h-0 flex-1 scroll-pt-8 overflow-auto border-t border-ink bg-sheet"
    >
      <table
        ref={table}
        // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: the grid pattern on a real table
        role="grid"
        aria-label={label}
        aria-rowcount={rows.length + 1}
        aria-readonly={readOnly || undefined}
        onKeyDown={onKey}
        onCopy={onCopy}
        onCut={onCopy}
        onPaste={onPaste}
        className="w-full border-collapse text-grid"
      >
        <thead className="sticky top-0 z-10 bg-sheet">
          <tr>
            {columns.map((one) => (
              <th
                key={one.key}
                scope="col"
                className={cx(
                  'px-1.5 py-1.5 text-label shadow-[inset_0_-1px_0_var(--ink)] font-normal whitespace-nowrap text-ink-soft first:pl-4 last:pr-4',
                  one.numeric ? 'text-right' : 'text-left',
                )}
              >
                {one.label}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((cell, r) => (
            <tr
              key={cell.circuit.id}
              aria-selected={cell.circuit.id === chosenId}
              className={cx(
                'h-7',
                cell.circuit.id === chosenId &&
                  'bg-wash [&>:first-child]:shadow-[inset_3px_0_0_var(--copper)]',
              )}
            >
              {columns.map((one, c) => {
                const here = r === row && c === column;
                return (
                  <GridCell
                    key={one.key}
                    column={one}
                    place={`${r}:${c}`}
                    here={here}
                    editing={here && editing !== null}
                    wrong={wrongIn(cell, one)}
                    onClick={() => {
                      if (here && editing) return;
                      go({ row: r, column: c });
                      onChoose(cell.circuit.id);
                    }}
                    onDoubleClick={() => open(null)}
                  >
                    {here && editing ? (
                      <CellEditor
                        label={`${one.label} of ${cell.circuit.code}`}
                        initial={editing.text}
                        caret={editing.caret}
                        numeric={one.numeric ?? false}
                        onTake={(text, step) =>
                          take(text, {
                            row: clamp(r + step.rows, rows.length),
                            column: clamp(c + step.columns, columns.length),
                          })
                        }
                        onLeave={leave}
                      />
                    ) : (
                      <CircuitCell column={one} {...cell} />
                    )}
                  </GridCell>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </Scroller>
  );
}

const clamp = (value: number, count: number) => Math.min(Math.max(value, 0), count - 1);

function placeOf(
  wanted: ScheduleGridProps['initial'],
  rows: readonly CellContext[],
  columns: readonly GridColumn[],
): Place {
  const row = rows.findIndex(({ circuit }) => circuit.id === wanted?.circuitId);
  const column = columns.findIndex((one) => one.field !== null && one.field === wanted?.field);
  return { row: Math.max(row, 0), column: Math.max(column, 0) };
}
