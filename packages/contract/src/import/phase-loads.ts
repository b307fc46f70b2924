import { lineOfSpace } from '../job/index.ts';
import type { Row } from '../rows/index.ts';
import type { ImportProblem } from './cells.ts';
import type { ImportField } from './headings.ts';
import { errorAt, type PlacedRecord } from './place-records.ts';
import type { ColumnMapping } from './recognise-columns.ts';
import { isDitto } from './records.ts';

const COLUMNS = { L1: 'vaL1', L2: 'vaL2', L3: 'vaL3' } as const satisfies Record<string, ImportField>;
/** Phases of a three-phase load may differ by this share and still be taken as equal. */
const EQUAL = 0.05;

/**
 * The load of a circuit from columns of VA per phase, over all rows of its breaker: the sum, as one load between
 * its terminals. Null where the columns say nothing.
 */
export function phaseLoads(
  placed: PlacedRecord,
  mapping: ColumnMapping,
  panel: Row<'panel'>,
  problems: ImportProblem[],
): string | null {
  const own = new Set(placed.spaces.map((space) => lineOfSpace(panel, space)));
  const sums = new Map<string, number>();
  for (const record of [placed.record, ...placed.more])
    for (const [line, field] of Object.entries(COLUMNS)) {
      const cell = record.fields[field];
      if (cell === undefined || isDitto(cell.text)) continue;
      const factor = mapping.columns[cell.column - 1]?.unit?.startsWith('k') ? 1000 : 1;
      const typed = /^(-?[\d,.]*\d)\s*(k?va|k?w)?$/i.exec(cell.text);
      const value = typed ? Number(typed[1]!.replace(/,(?=\d{3})/g, '').replace(',', '.')) : Number.NaN;
      if (Number.isNaN(value) || value < 0) {
        errorAt(problems, record)(field, `“${cell.text}” is not a number of VA.`, 'a number such as 1200');
        continue;
      }
      if (value === 0) continue;
      const scale = typed?.[2] ? (/^k/i.test(typed[2]) ? 1000 : 1) : factor;
      sums.set(line, (sums.get(line) ?? 0) + value * scale);
      if (!own.has(line as 'L1'))
        errorAt(problems, record, 'warning')(
          field,
          `Stands under ${line}; space ${placed.spaces.join(',')} of this panel is on ${[...own].join(' and ')}, which is taken.`,
          null,
        );
    }
  if (sums.size === 0) return null;
  const values = [...sums.values()];
  const total = values.reduce((sum, value) => sum + value, 0);
  const mean = total / Math.max(values.length, own.size);
  const uneven =
    own.size > 1 && [...own].some((line) => Math.abs((sums.get(line) ?? 0) - mean) > EQUAL * mean);
  if (uneven)
    errorAt(problems, placed.record, 'warning')(
      'vaL1',
      `The phases of this ${own.size}-pole circuit differ; their sum, ${round(total)} VA, is taken as one balanced load.`,
      null,
    );
  return `${round(total)} VA`;
}

const round = (value: number): string => String(Math.round(value * 1000) / 1000);
