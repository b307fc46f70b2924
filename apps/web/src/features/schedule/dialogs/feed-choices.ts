import { inOrder } from '@farlug/contract/job';
import type { JobRows } from '@farlug/contract/rows';
import { type Feed, panelTree, systemsOfRows, systemText } from '@farlug/contract/schedule';
import type { Choice } from '../../../ui/select.tsx';

/** What something can hang on, as a value of a list: a panel by a breaker, any other point, or nothing yet. */
export type FeedValue = '' | `panel:${string}` | `bus:${string}`;

export function feedOf(value: string): Feed | null {
  const id = value.slice(value.indexOf(':') + 1);
  if (value.startsWith('panel:')) return { panelId: id };
  return value.startsWith('bus:') ? { busId: id } : null;
}

export const busOfFeed = (rows: JobRows, value: string): string | null => {
  const feed = feedOf(value);
  if (feed === null) return null;
  return 'busId' in feed ? feed.busId : (rows.panel.get(feed.panelId)?.busId ?? null);
};

/** What the first panel of a job hangs on: the service. Later ones are asked for. */
export function firstFeed(rows: JobRows): FeedValue {
  const service = inOrder(rows.source.values())[0];
  return service && rows.panel.size === 0 ? `bus:${service.busId}` : '';
}

/** Panels from the service down, then secondaries of transformers, the service itself and junctions. */
export function feedChoices(rows: JobRows, without: ReadonlySet<string> = new Set()): Choice<FeedValue>[] {
  const systems = systemsOfRows(rows);
  const transformers = new Map([...rows.transformer.values()].map((one) => [one.toBusId, one]));
  const panelBuses = new Set([...rows.panel.values()].map((panel) => panel.busId));
  const label = (busId: string) => {
    const bus = rows.bus.get(busId)!;
    const system = systems.get(busId);
    return `${bus.code}${bus.name ? ` ${bus.name}` : ''}, ${system ? systemText(system) : 'not fed yet'}`;
  };
  const panels = panelTree(rows).map(({ panel }) => ({
    value: `panel:${panel.id}` as const,
    label: label(panel.busId),
    group: 'Panels',
    busId: panel.busId,
  }));
  const points = inOrder(rows.bus.values())
    .filter((bus) => !panelBuses.has(bus.id) && (bus.kind === 'service' || isJoint(rows, bus.id)))
    .map((bus) => {
      const before = transformers.get(bus.id);
      const system = systems.get(bus.id);
      return {
        value: `bus:${bus.id}` as const,
        label: before
          ? `${before.code}, secondary, ${system ? systemText(system) : 'not fed yet'}`
          : label(bus.id),
        group: before ? 'Transformers' : 'Other points',
        busId: bus.id,
      };
    })
    .sort((a, b) => Number(b.group === 'Transformers') - Number(a.group === 'Transformers'));
  return [...panels, ...points]
    .filter((one) => !without.has(one.busId))
    .map(({ busId: _, ...choice }) => choice);
}

/** A point of the distribution itself, not of a branch circuit. */
function isJoint(rows: JobRows, busId: string): boolean {
  for (const source of rows.source.values()) if (source.busId === busId) return true;
  for (const one of rows.transformer.values())
    if (one.fromBusId === busId || one.toBusId === busId) return true;
  for (const run of rows.run.values())
    if (run.kind !== 'branch' && (run.fromBusId === busId || run.toBusId === busId)) return true;
  return false;
}
