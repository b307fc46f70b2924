import { type Conductor, SYSTEM_CONDUCTORS, type System } from '@farlug/solver/job';
import { newId } from '../edit/index.ts';
import { blankRun } from '../job/index.ts';
import type { JobRows, Row } from '../rows/index.ts';
import { buildCircuit, linesOfBreakers } from './build-circuit.ts';
import { codeOfPanel } from './circuit-edits.ts';
import { systemsOfRows } from './nominal.ts';
import { inConductorOrder } from './reline.ts';
import type { RowChanges } from './row-changes.ts';
import { firstOpenSpace } from './space-search.ts';

/** What a new panel or transformer hangs on: a panel by a breaker or its feed-through lugs, or any other point. */
export type Feed =
  | { panelId: string; space?: number; poles?: 1 | 2 | 3; amps?: string | null; feedThrough?: boolean }
  | { busId: string };

type Fed = { runId: string; conductors: readonly Conductor[] } | { problem: string };

/** A run from the feed to `toBusId`, with a circuit and a breaker where a panel feeds it. */
export function feedTo(
  changes: RowChanges,
  feed: Feed,
  toBusId: string,
  code: string,
  more: Partial<Row<'run'>> = {},
): Fed {
  const here = conductorsAt(changes.rows, feed);
  if ('busId' in feed) {
    const atSource = [...changes.rows.source.values()].some((source) => source.busId === feed.busId);
    const conductors = here ?? ['L1', 'L2', 'L3', 'N'];
    const kind = atSource ? 'service' : 'feeder';
    return {
      runId: insertRun(changes, { from: feed.busId, to: toBusId, code, conductors }, { kind, ...more }),
      conductors,
    };
  }
  const panel = changes.rows.panel.get(feed.panelId);
  if (!panel) return { problem: 'The panel that should feed it is gone.' };
  const poles = feed.poles ?? (Math.min(3, panel.lines.length) as 1 | 2 | 3);
  const space = feed.feedThrough ? null : (feed.space ?? firstOpenSpace(changes.rows, panel, poles));
  if (space === null && !feed.feedThrough)
    return { problem: `${codeOfPanel(changes.rows, panel)} has no ${poles} open spaces together.` };
  const breakers = space === null ? [] : [{ space, poles, amps: feed.amps ?? null }];
  const circuit = buildCircuit(changes, panel, {
    kind: feed.feedThrough ? 'feed-through' : 'feeder',
    breakers,
  });
  const lines = breakers.length === 0 ? inConductorOrder(panel.lines) : linesOfBreakers(panel, breakers);
  const neutral = here === null || here.includes('N');
  const conductors: Conductor[] = neutral ? [...lines, 'N'] : lines;
  const runId = insertRun(
    changes,
    { from: panel.busId, to: toBusId, code, conductors },
    { circuitId: circuit.id, ...more },
  );
  return { runId, conductors };
}

export function insertRun(
  changes: RowChanges,
  {
    from,
    to,
    code,
    conductors,
  }: { from: string; to: string; code: string; conductors: readonly Conductor[] },
  more: Partial<Row<'run'>> = {},
): string {
  return changes.insert('run', {
    ...blankRun({
      id: newId(),
      code: changes.freshCode('run', code),
      orderKey: changes.nextKey('run'),
      kind: 'feeder',
      fromBusId: from,
      toBusId: to,
      conductors: [...conductors],
    }),
    ...more,
  }).id;
}

export function conductorsAt(rows: JobRows, feed: Feed): readonly Conductor[] | null {
  const busId = 'busId' in feed ? feed.busId : rows.panel.get(feed.panelId)?.busId;
  const system: System | undefined = systemsOfRows(rows).get(busId ?? '')?.origin.system;
  return system ? SYSTEM_CONDUCTORS[system] : null;
}
