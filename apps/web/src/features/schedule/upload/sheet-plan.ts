import {
  type Cells,
  type ColumnMapping,
  type ImportTarget,
  panelTitle,
  recogniseColumns,
} from '@farlug/contract/import';
import type { JobRows, Row } from '@farlug/contract/rows';
import { codeProblem, ROW_FIELDS } from '@farlug/contract/schedule';
import { type FeedValue, feedOf, firstFeed } from '../dialogs/feed-choices.ts';
import { usualLines } from '../dialogs/usual-lines.ts';

/** Where the circuits go: a panel of the job, or a new one as it is typed. */
export interface TargetDraft {
  /** Empty: a new panel. */
  panelId: string;
  code: string;
  spaces: string;
  mainAmps: string;
  feed: FeedValue;
}
/** What a person settled about one sheet. */
export interface SheetPlan {
  mapping: ColumnMapping;
  target: TargetDraft;
  receptaclesAtBreaker: boolean;
  spreadLighting: boolean;
  skipRows: readonly number[];
  /** The name that the lines above the headings give. */
  titled: string | null;
}

const PANEL_SPACES = [12, 18, 24, 30, 42, 54, 66, 84, 126, 200] as const;

/** A start for a sheet: its columns as recognised, into the panel that it names or that one came from. */
export function planOf(rows: JobRows, cells: Cells, panelId: string | null): SheetPlan {
  const mapping = recogniseColumns(cells);
  const title = panelTitle(cells, mapping);
  const named = title.code === null ? null : panelNamed(rows, title.code);
  return {
    mapping,
    target: {
      panelId: named?.id ?? (title.code === null ? (panelId ?? '') : ''),
      code: title.code ?? '',
      spaces: String(spacesFor(cells, mapping)),
      mainAmps: title.mainAmps ?? '',
      feed: firstFeed(rows),
    },
    receptaclesAtBreaker: true,
    spreadLighting: true,
    skipRows: [],
    titled: title.code,
  };
}

/** The sheet with the most recognised columns. */
export function likeliestSheet(sheets: readonly { cells: Cells }[]): number {
  const scores = sheets.map(({ cells }) => {
    const { headingRow, columns } = recogniseColumns(cells);
    return headingRow === null ? 0 : columns.filter((column) => column.field !== null).length;
  });
  return scores.indexOf(Math.max(...scores));
}

function panelNamed(rows: JobRows, code: string): Row<'panel'> | null {
  for (const panel of rows.panel.values())
    if (rows.bus.get(panel.busId)!.code.toLowerCase() === code.toLowerCase()) return panel;
  return null;
}

/** The usual panel that holds the highest space of the sheet. */
function spacesFor(cells: Cells, { headingRow, columns }: ColumnMapping): number {
  const numbered = columns.flatMap((use, i) => (use.field === 'space' ? [i] : []));
  const below = cells.slice((headingRow ?? -1) + 1);
  const numbers = below.flatMap((row) =>
    numbered.flatMap((column) => ((row[column] ?? '').match(/\d{1,3}/g) ?? []).map(Number)),
  );
  const most = Math.min(Math.max(numbered.length === 0 ? below.length : 1, ...numbers), 200);
  return PANEL_SPACES.find((count) => count >= most) ?? 200;
}

export interface TargetReading {
  target: ImportTarget;
  /** As it is named on the button. */
  code: string;
  errors: Partial<Record<keyof TargetDraft, string>>;
}

/** The panel to write into, with what is wrong in its fields. */
export function readTarget(rows: JobRows, draft: TargetDraft): TargetReading {
  const existing = rows.panel.get(draft.panelId);
  if (existing)
    return { target: { panelId: existing.id }, code: rows.bus.get(existing.busId)!.code, errors: {} };
  const code = draft.code.trim();
  const spaces = ROW_FIELDS.panel.spaces(draft.spaces.trim());
  const main = ROW_FIELDS.panel.mainAmps(draft.mainAmps.trim());
  const named = codeProblem(rows, code);
  const feed = feedOf(draft.feed);
  return {
    code: code || 'the new panel',
    target: {
      newPanel: {
        code,
        feed,
        panel: {
          ...(spaces.ok ? (spaces.set as { spaces: number }) : {}),
          ...(main.ok ? (main.set as { mainAmps: string | null }) : {}),
          ...(feed === null ? { lines: usualLines(rows) } : {}),
        },
      },
    },
    errors: {
      ...(named ? { code: named } : {}),
      ...(spaces.ok ? {} : { spaces: `Spaces ${spaces.message}.` }),
      ...(main.ok ? {} : { mainAmps: `Main breaker ${main.message}.` }),
    },
  };
}
