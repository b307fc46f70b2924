import { applyEdit, composeEdits, type Edit } from '@farlug/contract/edit';
import type { JobRows, Row } from '@farlug/contract/rows';
import {
  changeRowFieldEdit,
  type RowField,
  type ScheduleChange,
  type TypedTable,
} from '@farlug/contract/schedule';
import type { FieldErrors } from '../../../lib/form-errors.ts';
import { draftText, rowText, type Texts } from './row-texts.ts';

/** The changes of one dialog, each made upon the rows that the one before leaves, as one edit. */
export class EditChain {
  rows: JobRows;
  private readonly problems: Record<string, string> = {};
  private readonly edits: Edit[] = [];

  constructor(rows: JobRows) {
    this.rows = rows;
  }

  /** Makes a change; what is wrong with it is kept for the field of that name. */
  take(field: string, { edit, problem }: ScheduleChange): boolean {
    if (problem !== null) {
      this.problems[field] ??= problem;
      return false;
    }
    if (!edit) return true;
    const outcome = applyEdit(this.rows, edit);
    if (!outcome.ok) {
      this.problems[field] ??=
        'problems' in outcome
          ? outcome.problems.map((one) => one.message).join('; ')
          : 'The row was changed since.';
      return false;
    }
    this.rows = outcome.rows;
    this.edits.push(edit);
    return true;
  }

  /** Fields of a row as they were typed, those that differ from the row. */
  type<T extends TypedTable, F extends RowField<T>>(
    table: T,
    rowId: string,
    texts: Readonly<Record<F, string>>,
    fields: readonly F[],
    { at = '', words = {} }: { at?: string; words?: Texts } = {},
  ): void {
    for (const field of fields) {
      const text = texts[field].trim();
      const row = (this.rows[table] as ReadonlyMap<string, Row<T>>).get(rowId);
      if (!row) return;
      if (text === rowText(table, row, field).trim() && draftText(this.rows, table, rowId, field) === null)
        continue;
      const change = changeRowFieldEdit(this.rows, table, rowId, field, text);
      const problem = change.problem && `${words[field] ?? 'It'} ${change.problem}.`.replace(/\.\.$/, '.');
      this.take(`${at}${field}`, { ...change, problem });
    }
  }

  refuse(field: string, problem: string): void {
    this.problems[field] ??= problem;
  }

  get errors(): FieldErrors {
    return this.problems;
  }

  /** All of it as one edit; null where something is wrong or nothing changed. */
  edit(label: string): Edit | null {
    if (Object.keys(this.problems).length > 0 || this.edits.length === 0) return null;
    return composeEdits(this.edits, label);
  }
}
