import type { Edit } from '@farlug/contract/edit';
import { previewImport } from '@farlug/contract/import';
import type { JobRows } from '@farlug/contract/rows';
import { useDeferredValue, useMemo, useState } from 'react';
import { formatCount } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Field } from '../../../ui/field.tsx';
import { Message } from '../../../ui/message.tsx';
import { Select } from '../../../ui/select.tsx';
import { FileStep } from './file-step.tsx';
import { previewRows } from './preview-rows.ts';
import { likeliestSheet, planOf, readTarget, type SheetPlan } from './sheet-plan.ts';
import { SheetReview } from './sheet-review.tsx';
import { type ScheduleFile, useScheduleFile } from './use-schedule-file.ts';
import { Written, type WrittenImport } from './written.tsx';

interface ScheduleUploadProps {
  open: boolean;
  firm: string;
  rows: JobRows;
  panelId: string | null;
  /** What was wrong; null where it was taken. */
  apply: (edit: Edit) => string | null;
  undo: () => string | null;
  onClose: () => void;
  onWritten?: ((panelId: string) => void) | undefined;
}

interface OpenFile {
  file: ScheduleFile;
  sheet: number;
  /** By sheet: going from one to the other loses nothing. */
  plans: Readonly<Record<number, SheetPlan>>;
}

export function ScheduleUpload(props: ScheduleUploadProps) {
  const { open, firm, rows, panelId, apply, undo, onClose, onWritten } = props;
  const reading = useScheduleFile(firm);
  const [opened, setOpened] = useState<OpenFile | null>(null);
  const [choosing, setChoosing] = useState(true);
  const [refused, setRefused] = useState<string | null>(null);
  const [written, setWritten] = useState<WrittenImport | null>(null);

  const take = async (chosen: File) => {
    const file = await reading.read(chosen);
    if (!file) return;
    const sheet = likeliestSheet(file.sheets);
    setOpened({ file, sheet, plans: { [sheet]: planOf(rows, file.sheets[sheet]!.cells, panelId) } });
    setChoosing(false);
    setRefused(null);
  };
  const chooseSheet = (sheet: number) =>
    setOpened((now) => {
      if (!now) return now;
      const plan = now.plans[sheet] ?? planOf(rows, now.file.sheets[sheet]!.cells, panelId);
      return { ...now, sheet, plans: { ...now.plans, [sheet]: plan } };
    });
  const change = (fields: Partial<SheetPlan>) => {
    setRefused(null);
    setOpened((now) => {
      if (!now) return now;
      return { ...now, plans: { ...now.plans, [now.sheet]: { ...now.plans[now.sheet]!, ...fields } } };
    });
  };

  // What was just written would clash with itself: the sheet is judged only while it is still to be written.
  const judged = open && !choosing && !written ? opened : null;
  const latest = useDeferredValue(judged);
  const review = useMemo(() => (latest ? reviewOf(rows, latest) : null), [rows, latest]);
  const stale = latest !== judged;

  const write = () => {
    if (!review?.edit || !opened || stale) return;
    const problem = apply(review.edit);
    if (problem !== null) return setRefused(problem);
    setRefused(null);
    setWritten({ file: opened.file.fileName, code: review.target.code, edit: review.edit });
  };
  const close = () => {
    onClose();
    if (!written) return;
    setWritten(null);
    setOpened(null);
    setChoosing(true);
  };

  if (written)
    return (
      <Written
        open={open}
        rows={rows}
        written={written}
        onUndo={() => {
          const problem = undo();
          if (problem === null) setWritten(null);
          return problem;
        }}
        onClose={close}
        onShow={
          onWritten &&
          ((id) => {
            close();
            onWritten(id);
          })
        }
      />
    );
  const wide = !choosing && opened !== null;
  return (
    <Dialog
      open={open}
      onOpenChange={(next) => !next && close()}
      wide={wide}
      title={wide ? opened.file.fileName : 'Paste or upload a schedule'}
      description={
        <>
          A panel schedule from a drawing or a spreadsheet. <b>Nothing is written until you confirm.</b>
        </>
      }
      actions={
        wide &&
        review && (
          <>
            <Button
              look="go"
              big
              aria-disabled={!review.edit || stale || undefined}
              aria-describedby="upload-standing"
              onClick={write}
            >
              Write {review.count > 0 ? formatCount(review.count, 'row') : ''} into {review.target.code}
            </Button>
            <Button big onClick={() => setChoosing(true)}>
              Another file
            </Button>
            <p id="upload-standing" role="status" className="basis-full text-grid text-ink-soft">
              {review.standing}
            </p>
          </>
        )
      }
    >
      {wide && review && opened.plans[opened.sheet] ? (
        <>
          {refused && (
            <Message kind="wrong" className="mb-3">
              {refused} Nothing was written.
            </Message>
          )}
          {opened.file.sheets.length > 1 && (
            <Field label="Sheet of the workbook" className="mb-4 desk:max-w-80">
              <Select
                value={String(opened.sheet)}
                onValue={(sheet) => chooseSheet(Number(sheet))}
                choices={opened.file.sheets.map(({ name, cells }, i) => ({
                  value: String(i),
                  label: `${name}, ${formatCount(cells.length, 'row')}`,
                }))}
              />
            </Field>
          )}
          <SheetReview
            key={`${opened.file.fileName} ${opened.sheet}`}
            rows={rows}
            cells={opened.file.sheets[opened.sheet]!.cells}
            plan={opened.plans[opened.sheet]!}
            target={review.target}
            preview={review.preview}
            read={review.read}
            onPlan={change}
          />
        </>
      ) : (
        <FileStep
          busy={reading.busy}
          refused={reading.refused}
          onFile={(file) => void take(file)}
          onCancel={reading.cancel}
          onBack={opened ? () => setChoosing(false) : null}
        />
      )}
    </Dialog>
  );
}

/** What the open sheet would come to, and whether it may be written. */
function reviewOf(rows: JobRows, { file, sheet, plans }: OpenFile) {
  const { name, cells } = file.sheets[sheet]!;
  const plan = plans[sheet]!;
  const target = readTarget(rows, plan.target);
  const label = file.sheets.length > 1 ? `${file.fileName}, ${name}` : file.fileName;
  const preview = previewImport(rows, cells, plan.mapping, target.target, label, {
    receptaclesAtBreaker: plan.receptaclesAtBreaker,
    spreadLighting: plan.spreadLighting,
    skipRows: plan.skipRows,
  });
  const read = previewRows(cells, plan.mapping, preview, plan.skipRows);
  const wrongTarget = Object.values(target.errors)[0];
  return {
    target,
    preview,
    read,
    edit: wrongTarget ? null : preview.edit,
    count: read.counts.new + read.counts.idle,
    standing: standingOf(read, wrongTarget),
  };
}

function standingOf(
  { counts, errorRows, sheet }: ReturnType<typeof previewRows>,
  wrongTarget?: string,
): string {
  const said = [
    formatCount(counts.new, 'new circuit'),
    counts.idle > 0 && formatCount(counts.idle, 'spare or open space', 'spares and open spaces'),
    counts.refused > 0 && `${counts.refused} refused`,
    counts.skipped > 0 && `${counts.skipped} left out`,
    counts.passed > 0 && `${counts.passed} passed over`,
  ].filter(Boolean);
  const counted = `${said.join(', ')}.`;
  if (wrongTarget) return `${counted} ${wrongTarget}`;
  if (errorRows.length > 0)
    return `${counted} Put the refused rows right in the sheet, or leave them out, to write the others.`;
  if (sheet.some((problem) => problem.severity === 'error')) return 'This sheet cannot be written.';
  return `${counted} All of it is one step, which undo takes back.`;
}
