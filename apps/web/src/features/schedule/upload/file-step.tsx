import { useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { Field } from '../../../ui/field.tsx';
import { FileDrop } from '../../../ui/file-drop.tsx';
import { Message } from '../../../ui/message.tsx';
import { TextArea } from '../../../ui/text-input.tsx';

interface FileStepProps {
  busy: string | null;
  refused: string | null;
  onFile: (file: File) => void;
  onCancel: () => void;
  /** Back to the file that is open already. */
  onBack: (() => void) | null;
}

/** A file, or rows copied out of a spreadsheet. */
export function FileStep({ busy, refused, onFile, onCancel, onBack }: FileStepProps) {
  const [pasted, setPasted] = useState('');
  const [empty, setEmpty] = useState(false);
  const readPasted = (text: string) => {
    setEmpty(text.trim() === '');
    if (text.trim() !== '')
      onFile(new File([text], 'pasted rows.tsv', { type: 'text/tab-separated-values' }));
  };
  return (
    <div className="space-y-4">
      {refused && <Message kind="wrong">{refused} Nothing was written.</Message>}
      <FileDrop
        label="Choose a schedule"
        hint="or drop it here: CSV, TSV or XLSX, at most 5 MB. Headings are found wherever they stand."
        accept=".csv,.tsv,.txt,.xlsx,text/csv,application/vnd.openxmlformats-officedocument.spreadsheetml.sheet"
        busy={busy !== null}
        onFile={onFile}
      />
      <Field
        label="Or paste rows copied from a spreadsheet"
        hint="With their headings, if they have any. They are read as soon as they are pasted."
        error={
          empty ? 'Paste at least one row of a schedule, such as 1, Corridor lighting, 20, #12, 85 ft.' : null
        }
      >
        <TextArea
          rows={4}
          className="font-code text-label"
          value={pasted}
          onChange={(event) => setPasted(event.target.value)}
          onPaste={(event) => {
            const text = event.clipboardData.getData('text/plain');
            if (pasted.trim() !== '' || !text.includes('\n')) return;
            event.preventDefault();
            setPasted(text);
            readPasted(text);
          }}
        />
      </Field>
      <div className="flex flex-wrap items-center gap-3">
        <Button onClick={() => readPasted(pasted)} aria-disabled={busy !== null || undefined}>
          Read what is pasted
        </Button>
        {onBack && <Button onClick={onBack}>Back to the open file</Button>}
        {busy !== null && (
          <>
            <span role="status" className="text-grid text-ink-soft">
              Reading {busy} …
            </span>
            <Button look="bare" onClick={onCancel}>
              Cancel
            </Button>
          </>
        )}
      </div>
    </div>
  );
}
