import { type Edit, type EditConflict, type EditOp, newId } from '@farlug/contract/edit';

/** The edit made anew upon the values that stand now; null where a row it changes is gone or already there. */
export function mineOver(edit: Edit, conflicts: readonly EditConflict[]): Edit | null {
  if (conflicts.some((conflict) => conflict.field === null)) return theirsOver(edit, conflicts);
  const ops = edit.ops.map((op, index): EditOp => {
    const here = conflicts.filter((conflict) => conflict.op === index);
    if (here.length === 0 || op.was === null) return op;
    const was = { ...op.was };
    for (const { field, is } of here) was[field!] = is;
    return { ...op, was };
  });
  return { ...edit, editId: newId(), ops };
}

/** What is left of the edit without the fields that others changed; null where nothing is. */
export function theirsOver(edit: Edit, conflicts: readonly EditConflict[]): Edit | null {
  const ops = edit.ops.flatMap((op, index): EditOp[] => {
    const here = conflicts.filter((conflict) => conflict.op === index);
    if (here.length === 0) return [op];
    if (op.was === null || op.set === null || here.some((conflict) => conflict.field === null)) return [];
    const lost = new Set(here.map((conflict) => conflict.field));
    const rest = (fields: Record<string, unknown>) =>
      Object.fromEntries(Object.entries(fields).filter(([field]) => !lost.has(field)));
    const set = rest(op.set);
    return Object.keys(set).length === 0 ? [] : [{ ...op, was: rest(op.was), set }];
  });
  return ops.length === 0 ? null : { ...edit, editId: newId(), ops };
}
