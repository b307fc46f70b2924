import { type Cells, cellAt } from './cells.ts';
import type { ColumnMapping } from './recognise-columns.ts';

const NAME =
  /\b(?:panel ?board|panel|pnl|board|verteiler|tableau|tablero|cuadro|quadro)\b\s*(?:name|schedule|no\.?|:|-|–)*\s*["“]?([a-z]{0,4}[a-z0-9][\w.-]{0,20})/i;
const MAIN =
  /\b(\d{2,4})\s*(?:a|amps?)\b[^,;]*\b(?:main|mains|mcb|mlo|bus)\b|\b(?:main|mains|mcb|mlo|bus)\b[^,;\d]*(\d{2,4})\s*(?:a|amps?)?\b/i;

/** What the lines above the headings say of the panel: its name and its main, as a start for a new panel. */
export function panelTitle(
  cells: Cells,
  { headingRow }: ColumnMapping,
): { code: string | null; mainAmps: string | null } {
  let code: string | null = null;
  let mainAmps: string | null = null;
  for (let row = 0; row < (headingRow ?? 0); row++) {
    const line = (cells[row] ?? [])
      .map((_, column) => cellAt(cells, row, column))
      .filter((text) => text !== '')
      .join(' ');
    code ??= NAME.exec(line)?.[1] ?? null;
    const main = MAIN.exec(line);
    mainAmps ??= main?.[1] ?? main?.[2] ?? null;
  }
  return { code, mainAmps };
}
