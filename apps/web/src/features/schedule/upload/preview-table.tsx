import { type Cells, columnLetters, type ImportProblem } from '@farlug/contract/import';
import { Fragment, useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { Checkbox } from '../../../ui/checkbox.tsx';
import { cx } from '../../../ui/cx.ts';
import { Glyph } from '../../../ui/glyph.tsx';
import { Table, Td, Th } from '../../../ui/table.tsx';
import { IMPORT_WORDS } from './import-words.ts';
import { type PreviewLine, type PreviewRow, SHOWN_FIELDS } from './preview-rows.ts';

const AT_ONCE = 200;
const STATE_WORDS: Record<PreviewLine['state'], string> = {
  new: 'new',
  idle: 'spare',
  refused: 'refused',
  skipped: 'left out',
  passed: 'passed over',
};

interface PreviewTableProps {
  cells: Cells;
  rows: readonly PreviewRow[];
  onSkip: (row: number, skip: boolean) => void;
}

/** What each row of the sheet comes to, its problems under it by cell. */
export function PreviewTable({ cells, rows, onSkip }: PreviewTableProps) {
  const [shown, setShown] = useState(AT_ONCE);
  return (
    <>
      <Table stacked caption="Rows of the sheet as they are read">
        <thead>
          <tr>
            <Th numeric>Row</Th>
            {SHOWN_FIELDS.map((field) => (
              <Th key={field}>{IMPORT_WORDS[field]}</Th>
            ))}
            <Th>Comes to</Th>
            <Th>Leave out</Th>
          </tr>
        </thead>
        <tbody>
          {rows.slice(0, shown).map(({ row, lines, problems }) => (
            <Fragment key={row}>
              {lines.map((line, i) => (
                <tr
                  key={line.key}
                  className={cx(
                    line.state === 'skipped' && 'hatch text-ink-soft',
                    problems.length > 0 && 'max-desk:border-b-0!',
                  )}
                >
                  <th
                    scope="row"
                    className={cx(
                      'px-2 py-1 pl-4 text-right align-baseline font-normal text-ink-soft',
                      problems.length === 0 && 'border-b border-hair',
                    )}
                  >
                    <span className="desk:sr-only">Row </span>
                    {row}
                  </th>
                  {SHOWN_FIELDS.map((field) => (
                    <Td
                      key={field}
                      label={IMPORT_WORDS[field]}
                      className={cx(
                        problems.length > 0 && 'border-b-0!',
                        field === 'description' && 'font-bold',
                      )}
                    >
                      {line.texts[field]}
                    </Td>
                  ))}
                  <Td label="Comes to" className={cx(problems.length > 0 && 'border-b-0!')}>
                    <State state={line.state} />
                  </Td>
                  <Td className={cx(problems.length > 0 && 'border-b-0!')}>
                    {i === 0 && (line.state !== 'passed' || problems.length > 0) && (
                      <Checkbox
                        checked={line.state === 'skipped'}
                        onChecked={(skip) => onSkip(row, skip)}
                        label={`Leave row ${row} out`}
                        className="[&_label]:desk:sr-only"
                      />
                    )}
                  </Td>
                </tr>
              ))}
              {problems.length > 0 && (
                <tr>
                  <td
                    colSpan={SHOWN_FIELDS.length + 3}
                    className="border-b border-hair px-4 pb-1.5 desk:pl-14"
                  >
                    {problems.map((problem) => (
                      <Problem key={`${problem.column} ${problem.message}`} problem={problem} cells={cells} />
                    ))}
                  </td>
                </tr>
              )}
            </Fragment>
          ))}
        </tbody>
      </Table>
      {rows.length > shown && (
        <Button className="mx-4 my-2" onClick={() => setShown(shown + AT_ONCE)}>
          Show {Math.min(AT_ONCE, rows.length - shown)} more of {rows.length - shown}
        </Button>
      )}
    </>
  );
}

function State({ state }: { state: PreviewLine['state'] }) {
  if (state === 'refused')
    return (
      <span className="font-bold text-over">
        <Glyph kind="over" className="mr-1.5" />
        {STATE_WORDS[state]}
      </span>
    );
  return <span className={cx(state !== 'new' && 'text-ink-soft')}>{STATE_WORDS[state]}</span>;
}

const TONES: Record<ImportProblem['severity'], string> = {
  error: 'text-over',
  warning: 'text-near',
  remark: 'text-ink-soft',
};

function Problem({ problem, cells }: { problem: ImportProblem; cells: Cells }) {
  const { row, column, severity, message, wouldBeRight } = problem;
  const text = column === 0 ? '' : (cells[row - 1]?.[column - 1] ?? '').trim();
  return (
    <p className={cx('text-grid', TONES[severity])}>
      {severity !== 'remark' && <Glyph kind={severity === 'error' ? 'over' : 'near'} className="mr-1.5" />}
      {column > 0 && (
        <b>
          {columnLetters(column)}
          {row}
          {text !== '' && !message.includes(text) ? ` “${text.slice(0, 60)}”` : ''}:{' '}
        </b>
      )}
      {message}
      {wouldBeRight && <span className="text-ink"> Right would be {wouldBeRight}.</span>}
    </p>
  );
}
