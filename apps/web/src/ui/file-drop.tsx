import { type DragEvent, type ReactNode, useId, useRef, useState } from 'react';
import { Button } from './button.tsx';
import { cx } from './cx.ts';

interface FileDropProps {
  label: string;
  hint: ReactNode;
  /** As the input's `accept`. */
  accept: string;
  busy?: boolean;
  onFile: (file: File) => void;
}

/** Takes one file: dropped, or chosen. */
export function FileDrop({ label, hint, accept, busy = false, onFile }: FileDropProps) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const take = (files: FileList | null) => {
    const file = files?.[0];
    if (file) onFile(file);
    if (input.current) input.current.value = '';
  };
  const onDrop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    take(event.dataTransfer.files);
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping is a shortcut for the button inside
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={onDrop}
      className={cx(
        'border border-dashed px-4 py-8 text-center',
        over ? 'border-copper bg-wash' : 'border-line bg-sheet',
      )}
    >
      <label htmlFor={id} className="sr-only">
        {label}
      </label>
      <input
        ref={input}
        id={id}
        type="file"
        accept={accept}
        className="sr-only"
        tabIndex={-1}
        onChange={(event) => take(event.target.files)}
      />
      <Button
        big
        look="line"
        aria-disabled={busy || undefined}
        onClick={() => !busy && input.current?.click()}
      >
        {busy ? 'Reading …' : label}
      </Button>
      <p className="mt-2 text-grid text-ink-soft">{hint}</p>
    </div>
  );
}
