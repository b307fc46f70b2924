import { parseBreaker } from '@farlug/solver/units';
import { breakersOfSpaces, spaceStep, spacesFromText, spacesOfBreaker } from '../job/index.ts';
import type { Row } from '../rows/index.ts';
import type { ImportProblem } from './cells.ts';
import { isDitto, type SheetRecord } from './records.ts';
import { bareSpace } from './space-text.ts';

/** A circuit of the sheet: its first record, those that only continue it, and its place in the panel. */
export interface PlacedRecord {
  record: SheetRecord;
  more: SheetRecord[];
  spaces: number[];
  half: 'a' | 'b' | null;
  breakers: { space: number; poles: number; half: 'a' | 'b' | null }[];
  amps: string | null;
}
type Panel = Pick<Row<'panel'>, 'layout' | 'spaces' | 'lines'>;

export interface Placement {
  placed: PlacedRecord[];
  problems: ImportProblem[];
}

type OpenSpace = (poles: number, taken: ReadonlySet<number>) => number | null;
interface Place {
  spaces: number[];
  half: 'a' | 'b' | null;
}
interface Breaker {
  amps: string | null;
  /** Null where nothing says how many. */
  poles: number | null;
}

/**
 * Finds the place of every record: its spaces by number, by breaker poles, and by the rows that continue a
 * multi-pole breaker below its first pole. A sheet without space numbers fills the open spaces in turn.
 */
export function placeRecords(
  records: readonly SheetRecord[],
  panel: Panel,
  numbered: boolean,
  open: OpenSpace,
): Placement {
  const placer = new Placer(panel, open);
  for (const record of records) {
    if (numbered) placer.placeNumbered(record);
    else placer.placeNext(record);
  }
  return { placed: placer.placed, problems: placer.problems };
}

class Placer {
  readonly placed: PlacedRecord[] = [];
  readonly problems: ImportProblem[] = [];
  private readonly claimed = new Map<number, PlacedRecord[]>();
  private readonly panel: Panel;
  private readonly open: OpenSpace;

  constructor(panel: Panel, open: OpenSpace) {
    this.panel = panel;
    this.open = open;
  }

  placeNumbered(record: SheetRecord): void {
    const error = errorAt(this.problems, record);
    const place = readSpaces(record, this.panel, error);
    const breaker = readBreaker(record, error);
    if (place === 'refused' || breaker === null) return;
    const above = this.placed.at(-1);
    if (place === null) {
      if (above && isContinuation(record, above)) above.more.push(record);
      else if (hasContent(record))
        error('space', 'The space is missing.', 'the number of its space, such as 7 or 2,4');
      return;
    }
    const owner = this.ownerFurtherUp(place);
    if (owner && isContinuation(record, owner)) owner.more.push(record);
    else if (hasContent(record)) this.put(record, place, breaker);
  }

  placeNext(record: SheetRecord): void {
    const error = errorAt(this.problems, record);
    const breaker = readBreaker(record, error);
    if (breaker === null) return;
    const poles = breaker.poles ?? 1;
    const space = this.open(poles, new Set(this.claimed.keys()));
    if (space === null)
      error(
        null,
        'The panel has no open space left for it.',
        `a panel with more than ${this.panel.spaces} spaces`,
      );
    else this.put(record, { spaces: [space], half: null }, breaker);
  }

  /** The multi-pole breaker, begun in an earlier space, that takes this one too. */
  private ownerFurtherUp({ spaces }: Place): PlacedRecord | undefined {
    if (spaces.length !== 1) return undefined;
    return (this.claimed.get(spaces[0]!) ?? []).find((one) => one.spaces[0] !== spaces[0]);
  }

  private put(record: SheetRecord, place: Place, { amps, poles }: Breaker): void {
    const error = errorAt(this.problems, record);
    const { layout } = this.panel;
    const first = place.spaces[0]!;
    const spaces =
      place.spaces.length === 1 ? spacesOfBreaker(layout, { space: first, poles: poles ?? 1 }) : place.spaces;
    const last = Math.max(...spaces);
    if (last > this.panel.spaces) {
      const right = `a space from 1 to ${this.panel.spaces}`;
      error('space', `Space ${last} is beyond the ${this.panel.spaces} spaces of the panel.`, right);
      return;
    }
    const together = poles ?? spaces.length;
    const groups = breakersOfSpaces(layout, spaces, together);
    if (groups.length > 1 && together > 1) {
      const right = spacesOfBreaker(layout, { space: first, poles: spaces.length }).join(',');
      error('space', `A ${spaces.length}-pole breaker takes neighbours, ${spaceStep(layout)} apart.`, right);
      return;
    }
    const { half } = place;
    const breakers = groups.map((group) => ({ ...group, half }));
    this.claim({ record, more: [], spaces, half, breakers, amps }, error);
  }

  private claim(one: PlacedRecord, error: ErrorAt): void {
    for (const space of one.spaces) {
      const other = (this.claimed.get(space) ?? []).find((claim) => !isTandem(one, claim));
      if (!other) continue;
      const right = 'each space once; 7a and 7b for the halves of a tandem';
      error('space', `Space ${space} is taken by row ${other.record.row} too.`, right);
      return;
    }
    for (const space of one.spaces) this.claimed.set(space, [...(this.claimed.get(space) ?? []), one]);
    this.placed.push(one);
  }
}

type ErrorAt = (
  field: keyof SheetRecord['fields'] | null,
  message: string,
  wouldBeRight: string | null,
) => void;
export const errorAt =
  (problems: ImportProblem[], record: SheetRecord, severity: ImportProblem['severity'] = 'error'): ErrorAt =>
  (field, message, wouldBeRight) =>
    problems.push({
      row: record.row,
      column: field === null ? 0 : (record.fields[field]?.column ?? 0),
      severity,
      message,
      wouldBeRight,
    });

const isTandem = (a: PlacedRecord, b: PlacedRecord): boolean =>
  a.half !== null && b.half !== null && a.half !== b.half;

function readSpaces({ fields }: SheetRecord, panel: Panel, error: ErrorAt): Place | null | 'refused' {
  const text = fields.space?.text;
  if (text === undefined || isDitto(text)) return null;
  const own = bareSpace(text);
  const tandem = /^(\d{1,3})\s*([ab])$/i.exec(own);
  const way = panel.layout === 'three-phase-ways' ? /^(\d{1,3})\s*\/?\s*(l[123])$/i.exec(own) : null;
  const spaces = tandem
    ? [Number(tandem[1])]
    : way
      ? [3 * (Number(way[1]) - 1) + Number(way[2]![1])]
      : spacesFromText(own);
  if (spaces === null) {
    error('space', `“${text}” is not a space.`, 'the number of its space, such as 7, 2,4 or 1/3/5');
    return 'refused';
  }
  return { spaces, half: tandem ? (tandem[2]!.toLowerCase() as 'a' | 'b') : null };
}

/** Amps and poles of the record; null where they are refused. Poles stay unsaid where nothing says them. */
function readBreaker({ fields }: SheetRecord, error: ErrorAt): Breaker | null {
  const said = fields.poles?.text;
  const poles =
    said === undefined || isDitto(said)
      ? null
      : Number(/^([123])\s*(p|pole|poles|polig)?$/i.exec(said)?.[1] ?? Number.NaN);
  if (Number.isNaN(poles)) {
    error('poles', `“${said}” is not a number of poles.`, '1, 2 or 3');
    return null;
  }
  const text = fields.breaker?.text;
  if (text === undefined || isDitto(text)) return { amps: null, poles };
  const one = parseBreaker(text, 1);
  const other = parseBreaker(text, 2);
  if (!one.ok || !other.ok) {
    error('breaker', `“${text}” is not a breaker.`, '20, 20/2 or 100A/3P');
    return null;
  }
  return { amps: String(one.amps), poles: one.poles === other.poles ? one.poles : poles };
}

/** A row that says nothing new, below the first pole of a breaker: blank, dittos, or the same words again. */
function isContinuation(record: SheetRecord, owner: PlacedRecord): boolean {
  const { description, breaker } = record.fields;
  const same = (a: string | undefined, b: string | undefined) =>
    isDitto(a) || a?.toLowerCase() === b?.toLowerCase();
  return (
    same(description?.text, owner.record.fields.description?.text) &&
    same(breaker?.text, owner.record.fields.breaker?.text)
  );
}

const hasContent = ({ fields }: SheetRecord): boolean =>
  Object.entries(fields).some(
    ([field, cell]) => !['space', 'line', 'poles'].includes(field) && !isDitto(cell?.text),
  );
