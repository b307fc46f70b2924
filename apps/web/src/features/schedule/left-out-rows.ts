import type { LeftOut } from '@farlug/contract/job';

export interface LeftOutRow {
  key: string;
  circuitId: string | null;
  panelId: string | null;
  code: string | null;
  reasons: string[];
}

/** What is left out, a schedule row once, with every reason of its own; what only follows from another comes last. */
export function leftOutRows(leftOut: readonly LeftOut[]): LeftOutRow[] {
  const rows = new Map<string, LeftOutRow>();
  for (const entry of [...leftOut].sort((a, b) => Number(a.follows) - Number(b.follows))) {
    const key = entry.circuitId ?? `${entry.table} ${entry.row}`;
    const row = rows.get(key) ?? {
      key,
      circuitId: entry.circuitId,
      panelId: entry.panelId,
      code: entry.code,
      reasons: [],
    };
    rows.set(key, row);
    if (!row.reasons.includes(entry.reason)) row.reasons.push(entry.reason);
  }
  return [...rows.values()];
}
