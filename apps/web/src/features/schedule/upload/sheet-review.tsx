import { type Cells, type ImportPreview, recogniseColumns } from '@farlug/contract/import';
import type { JobRows } from '@farlug/contract/rows';
import { useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { Checkbox } from '../../../ui/checkbox.tsx';
import { Field } from '../../../ui/field.tsx';
import { Message } from '../../../ui/message.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { Select } from '../../../ui/select.tsx';
import { samplesOf } from './column-mapping.ts';
import { ColumnsTable } from './columns-table.tsx';
import type { ReadPreview } from './preview-rows.ts';
import { PreviewTable } from './preview-table.tsx';
import type { SheetPlan, TargetDraft, TargetReading } from './sheet-plan.ts';
import { TargetFields } from './target-fields.tsx';

interface SheetReviewProps {
  rows: JobRows;
  cells: Cells;
  plan: SheetPlan;
  target: TargetReading;
  preview: ImportPreview;
  read: ReadPreview;
  onPlan: (fields: Partial<SheetPlan>) => void;
}

const HEADING_ROWS = 60;

/** A sheet as it would be written: where to, what its columns hold, and what each of its rows comes to. */
export function SheetReview({ rows, cells, plan, target, preview, read, onPlan }: SheetReviewProps) {
  const job = [...rows.job.values()][0]!;
  const { mapping, skipRows } = plan;
  const [wanted, setWanted] = useState<'wrong' | 'all' | null>(null);
  const shown = wanted ?? (read.errorRows.length > 0 ? 'wrong' : 'all');
  const wrong = read.rows.filter(({ problems }) => problems.some((one) => one.severity !== 'remark'));
  const onTarget = (fields: Partial<TargetDraft>) => onPlan({ target: { ...plan.target, ...fields } });
  const headingRows = cells.slice(0, HEADING_ROWS).flatMap((row, i) => {
    const text = row.filter((cell) => cell.trim() !== '').join(', ');
    return text === '' ? [] : [{ value: String(i), label: `Row ${i + 1}: ${text.slice(0, 60)}` }];
  });
  const filled = mapping.columns.filter(
    (use, column) => use.heading || samplesOf(cells, mapping, column).length > 0,
  ).length;
  const readCount = mapping.columns.filter((use) => use.field !== null).length;
  const [unsure] = useState(readCount < 4 || read.columns.size > 0);
  const elsewhere = plan.titled !== null && plan.target.panelId !== '' && target.code !== plan.titled;
  return (
    <div className="space-y-5">
      <Part title="Where it goes">
        <TargetFields rows={rows} target={plan.target} errors={target.errors} onChange={onTarget} />
        {elsewhere && (
          <Message kind="note" className="mt-2">
            The sheet calls its panel {plan.titled}.{' '}
            <Button look="bare" onClick={() => onTarget({ panelId: '', code: plan.titled! })}>
              Make {plan.titled} a new panel
            </Button>
          </Message>
        )}
      </Part>
      <details open={unsure} className="border-y border-rule py-2">
        <summary className="tap content-center text-grid">
          <b>What the columns hold.</b>{' '}
          <span className="text-ink-soft">
            {readCount} of {filled} read, headings in{' '}
            {mapping.headingRow === null ? 'no row' : `row ${mapping.headingRow + 1}`}
          </span>
        </summary>
        <Field label="Headings stand in" className="mt-2 mb-2 desk:max-w-120">
          <Select
            value={mapping.headingRow === null ? '' : String(mapping.headingRow)}
            onValue={(row) => onPlan({ mapping: recogniseColumns(cells, row === '' ? null : Number(row)) })}
            choices={[{ value: '', label: 'No row: the sheet has no headings' }, ...headingRows]}
          />
        </Field>
        <div className="-mx-4">
          <ColumnsTable
            cells={cells}
            mapping={mapping}
            problems={read.columns}
            lengthUnit={job.lengthUnit}
            onMapping={(next) => onPlan({ mapping: next })}
          />
        </div>
        <div className="mt-2 grid gap-x-6 desk:grid-cols-2">
          <Checkbox
            checked={plan.receptaclesAtBreaker}
            onChecked={(receptaclesAtBreaker) => onPlan({ receptaclesAtBreaker })}
            label="Judge receptacle circuits at 80 % of their breaker"
            hint="Common practice, marked as assumed; what the sheet states counts upstream."
          />
          <Checkbox
            checked={plan.spreadLighting}
            onChecked={(spreadLighting) => onPlan({ spreadLighting })}
            label="Spread lighting evenly along its run"
            hint="Common practice: the fixtures hang along the way, not at its end."
          />
        </div>
      </details>
      <Part title="What its rows come to">
        {read.sheet.map((problem) => (
          <Message
            key={problem.message}
            kind={problem.severity === 'error' ? 'wrong' : 'note'}
            className="mb-2"
          >
            {problem.message} {problem.wouldBeRight}
          </Message>
        ))}
        {read.rows.length > 0 && (
          <>
            <div className="mb-2 flex flex-wrap items-center gap-x-4 gap-y-2">
              <Segmented
                label="Rows shown"
                value={shown}
                onValue={setWanted}
                choices={[
                  { value: 'wrong', label: `To look at, ${wrong.length}` },
                  { value: 'all', label: `All rows, ${read.rows.length}` },
                ]}
              />
              {read.errorRows.length > 1 && (
                <Button
                  onClick={() => {
                    setWanted('all');
                    onPlan({ skipRows: [...skipRows, ...read.errorRows] });
                  }}
                >
                  Leave the {read.errorRows.length} refused rows out
                </Button>
              )}
              {skipRows.length > 0 && (
                <Button onClick={() => onPlan({ skipRows: [] })}>Take every row in again</Button>
              )}
            </div>
            <div className="-mx-4">
              <PreviewTable
                cells={cells}
                rows={shown === 'wrong' ? wrong : read.rows}
                onSkip={(row, skip) =>
                  onPlan({ skipRows: skip ? [...skipRows, row] : skipRows.filter((one) => one !== row) })
                }
              />
            </div>
            {shown === 'wrong' && wrong.length === 0 && (
              <p className="text-grid text-ink-soft">
                Nothing to look at: {preview.circuits.length} circuits are read without a question.
              </p>
            )}
          </>
        )}
      </Part>
    </div>
  );
}

function Part({ title, children }: { title: string; children: React.ReactNode }) {
  return (
    <section>
      <h3 className="mb-2 border-b border-line pb-1 text-label font-normal text-ink-soft">{title}</h3>
      {children}
    </section>
  );
}
