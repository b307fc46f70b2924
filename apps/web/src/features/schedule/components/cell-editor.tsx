import { type KeyboardEvent, useEffect, useRef } from 'react';
import { cx } from '../../../ui/cx.ts';

interface CellEditorProps {
  label: string;
  initial: string;
  caret: 'all' | 'end';
  numeric: boolean;
  onTake: (text: string, step: { rows: number; columns: number }) => void;
  onLeave: () => void;
}

/** A cell being typed into. What was typed is taken by Enter, Tab and by leaving; Esc alone lets it go. */
export function CellEditor({ label, initial, caret, numeric, onTake, onLeave }: CellEditorProps) {
  const input = useRef<HTMLInputElement>(null);
  const done = useRef(false);
  useEffect(() => {
    input.current?.focus();
    if (caret === 'all') input.current?.select();
  }, [caret]);
  const finish = (step: { rows: number; columns: number }) => {
    if (done.current) return;
    done.current = true;
    onTake(input.current?.value ?? '', step);
  };
  const onKey = (event: KeyboardEvent) => {
    event.stopPropagation();
    if (event.key === 'Escape') {
      done.current = true;
      onLeave();
    } else if (event.key === 'Enter') finish({ rows: event.shiftKey ? -1 : 1, columns: 0 });
    else if (event.key === 'Tab') finish({ rows: 0, columns: event.shiftKey ? -1 : 1 });
    else return;
    event.preventDefault();
  };
  return (
    <input
      ref={input}
      aria-label={label}
      defaultValue={initial}
      autoComplete="off"
      onKeyDown={onKey}
      onBlur={() => finish({ rows: 0, columns: 0 })}
      className={cx(
        'absolute inset-0 w-full min-w-24 border-2 border-copper bg-sheet px-1.5 text-grid text-ink outline-none',
        numeric && 'right-0 left-auto text-right',
      )}
    />
  );
}
