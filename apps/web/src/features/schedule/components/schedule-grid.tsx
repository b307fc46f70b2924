import type { CircuitField, CircuitView } from '@farlug/contract/schedule';
import { type KeyboardEvent, useEffect, useRef, useState } from 'react';
import { cx } from '../../../ui/cx.ts';
import { Scroller } from '../../../ui/scroller.tsx';
import { type GridColumn, rowName } from '../columns.ts';
import { moveBy } from '../grid-moves.ts';
import { CellEditor } from './cell-editor.tsx';
import { type CellContext, CircuitCell } from './circuit-cell.tsx';

interface ScheduleGridProps {
  label: string;
  columns: readonly GridColumn[];
  rows: readonly CellContext[];
  chosenId: string | null;
  readOnly: boolean;
  onChoose: (circuitId: string) => void;
  onType: (circuitId: string, field: CircuitField, text: string) => string | null;
  onDuplicate: (circuitId: string) => void;
  onRemove: (circuitId: string) => void;
  onUndo: () => void;
  onRedo: () => void;
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
  const { label, columns, rows, chosenId, readOnly, onChoose, onType } = props;
  const [at, setAt] = useState<Place>({ row: 0, column: 0 });
  const [editing, setEditing] = useState<{ text: string; caret: 'all' | 'end' } | null>(null);
  const [problem, setProblem] = useState<{ id: string; key: string; text: string } | null>(null);
  const table = useRef<HTMLTableElement>(null);
  const wantsFocus = useRef(false);
  const row = Math.min(at.row, Math.max(rows.length - 1, 0));
  const column = Math.min(at.column, columns.length - 1);

  // The focus follows the place only after a key or a click in the grid: a result that arrives moves nothing.
  useEffect(() => {
    if (!wantsFocus.current || editing) return;
    wantsFocus.current = false;
    const cell = table.current?.querySelector<HTMLElement>(`[data-cell="${row}:${column}"]`);
    cell?.focus();
    cell?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  });

  const go = (place: Place) => {
    wantsFocus.current = true;
    setAt(place);
  };
  const open = (text: string | null) => {
    const field = columns[column]!.field;
    const circuit = rows[row]?.circuit;
    if (!field || !circuit || readOnly) return;
    setEditing(text === null ? { text: circuit.fields[field].text, caret: 'all' } : { text, caret: 'end' });
  };
  const take = (text: string, then: Place) => {
    const field = columns[column]!.field!;
    const { id } = rows[row]!.circuit;
    const refused = onType(id, field, text);
    setProblem(refused === null ? null : { id, key: columns[column]!.key, text: refused });
    setEditing(null);
    go(then);
  };
  const leave = () => {
    setEditing(null);
    go({ row, column });
  };

  const onKey = (event: KeyboardEvent) => {
    if (editing) return;
    const circuit = rows[row]?.circuit;
    const command = event.ctrlKey || event.metaKey;
    const moved = moveBy(event, { row, column }, rows.length, columns.length);
    if (moved) go(moved);
    else if (command && event.key.toLowerCase() === 'z') (event.shiftKey ? props.onRedo : props.onUndo)();
    else if (command && event.key.toLowerCase() === 'y') props.onRedo();
    else if (command && event.key.toLowerCase() === 'd' && circuit && !readOnly)
      props.onDuplicate(circuit.id);
    else if (event.key === 'Enter' || event.key === 'F2') open(null);
    else if (event.key === ' ' && circuit) onChoose(circuit.id);
    else if (event.key === 'Delete' && event.shiftKey && circuit && !readOnly) props.onRemove(circuit.id);
    else if (
      (event.key === 'Delete' || event.key === 'Backspace') &&
      columns[column]!.field &&
      circuit &&
      !readOnly
    )
      take('', { row, column });
    else if (event.key.length === 1 && !command && !event.altKey && event.key !== '?') open(event.key);
    else return;
    event.preventDefault();
  };

  return (
    <Scroller
      label={`${label}, scrolls`}
      className="min-h-0 flex-1 overflow-auto border-t border-ink bg-sheet"
    >
      <table
        ref={table}
        // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: the ARIA grid pattern on a table
        role="grid"
        aria-label={label}
        aria-rowcount={rows.length + 1}
        aria-readonly={readOnly || undefined}
        onKeyDown={onKey}
        className="w-full border-collapse text-grid"
      >
        <thead className="sticky top-0 z-10 bg-sheet">
          <tr>
            {columns.map((one) => (
              <th
                key={one.key}
                scope="col"
                className={cx(
                  'border-b border-ink px-1.5 py-1.5 text-label font-normal whitespace-nowrap text-ink-soft first:pl-4 last:pr-4',
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
                  'bg-wash [&>:first-child]:border-l-3 [&>:first-child]:border-l-copper',
              )}
            >
              {columns.map((one, c) => {
                const here = r === row && c === column;
                const wrong =
                  problem?.id === cell.circuit.id && problem.key === one.key ? problem.text : null;
                return (
                  <GridCell
                    key={one.key}
                    column={one}
                    place={`${r}:${c}`}
                    here={here}
                    wrong={wrong}
                    name={one.key === 'description' ? undefined : `${one.label}, ${rowName(cell.circuit)}`}
                    onClick={() => {
                      if (!here) setEditing(null);
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

interface GridCellProps {
  column: GridColumn;
  place: string;
  here: boolean;
  wrong: string | null;
  name: string | undefined;
  onClick: () => void;
  onDoubleClick: () => void;
  children: React.ReactNode;
}

function GridCell({ column, place, here, wrong, onClick, onDoubleClick, children }: GridCellProps) {
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: the grid handles the keys of its cells
    <td
      // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: a cell of a table that is an ARIA grid
      role="gridcell"
      data-cell={place}
      tabIndex={here ? 0 : -1}
      aria-readonly={column.field === null || undefined}
      onClick={onClick}
      onDoubleClick={onDoubleClick}
      className={cx(
        'relative border-b border-hair px-1.5 py-0.5 align-baseline -outline-offset-2 first:pl-4 last:pr-4',
        column.width,
        column.numeric && 'text-right whitespace-nowrap',
        column.key === 'line' && 'whitespace-nowrap',
      )}
    >
      {children}
      {wrong && (
        <span role="alert" className="block text-left text-label whitespace-normal text-over">
          {wrong}
        </span>
      )}
    </td>
  );
}

export type { CircuitView };
