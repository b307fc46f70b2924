import type { Edit } from '@farlug/contract/edit';
import {
  addCircuitEdit,
  type CircuitField,
  changeCircuitFieldEdit,
  deleteCircuitEdit,
  duplicateCircuitEdit,
  type NewCircuit,
} from '@farlug/contract/schedule';
import { useMemo } from 'react';
import { useOpenJob } from '../../../job/open-job.tsx';
import type { TypedCell } from '../grid-block.ts';
import { typeCellsEdit } from '../type-cells.ts';

/** What was understood, or why not; text that was not understood is kept in its cell. */
export interface Typed {
  problem: string | null;
}

export interface ScheduleEdits {
  type(circuitId: string, field: CircuitField, text: string): Typed;
  /** Several cells as one step. */
  typeCells(cells: readonly TypedCell[]): Typed;
  add(panelId: string, given?: NewCircuit): { id: string | null; problem: string | null };
  duplicate(circuitId: string): { id: string | null; problem: string | null };
  remove(circuitId: string): Typed;
  apply(edit: Edit | null, problem?: string | null): Typed;
  undo(): Typed;
  redo(): Typed;
}

/** Edits of the open job, made upon the rows as they stand at the moment of the keystroke. */
export function useScheduleEdits(): ScheduleEdits {
  const { replica } = useOpenJob();
  return useMemo(() => {
    const rows = () => replica.getSnapshot().rows;
    const apply = (edit: Edit | null, problem: string | null = null): Typed => {
      if (!edit) return { problem };
      const done = replica.apply(edit);
      return { problem: done.ok ? problem : done.message };
    };
    const said = (done: ReturnType<typeof replica.undo>): Typed => ({
      problem: done.ok ? null : done.message,
    });
    return {
      apply,
      type(circuitId, field, text) {
        const change = changeCircuitFieldEdit(rows(), circuitId, field, text);
        return apply(change.edit, change.problem);
      },
      typeCells(cells) {
        const change = typeCellsEdit(rows(), cells);
        return apply(change.edit, change.problem);
      },
      add(panelId, given) {
        const change = addCircuitEdit(rows(), panelId, given);
        const { problem } = apply(change.edit, change.problem);
        return { id: problem === null ? change.id : null, problem };
      },
      duplicate(circuitId) {
        const change = duplicateCircuitEdit(rows(), circuitId);
        const { problem } = apply(change.edit, change.problem);
        return { id: problem === null ? change.id : null, problem };
      },
      remove(circuitId) {
        const change = deleteCircuitEdit(rows(), circuitId);
        return apply(change.edit, change.problem);
      },
      undo: () => said(replica.undo()),
      redo: () => said(replica.redo()),
    };
  }, [replica]);
}
