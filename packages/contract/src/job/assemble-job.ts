import type { Job } from '@farlug/solver/job';
import type { JobRows, Row } from '../rows/index.ts';
import {
  busEntry,
  conductorEntry,
  loadEntry,
  panelEntry,
  readingEntry,
  runEntry,
  sourceEntry,
  transformerEntry,
} from './file-entries.ts';
import type { JobIndex, Placed } from './job-index.ts';
import { limitsFromRows } from './limits-rows.ts';
import { inOrder } from './order-keys.ts';
import { circuitPlaces, panelSheets } from './overlay-entries.ts';
import type { Selection } from './selection.ts';

export interface Assembled {
  job: Job;
  index: JobIndex;
}

/** The job file of the selected rows. Only buses that something feeds are in it. */
export function assembleJob(rows: JobRows, selection: Selection): Assembled {
  const header = [...rows.job.values()][0];
  if (!header) throw new Error('rows without a job');
  const codeOf = (busId: string) => rows.bus.get(busId)!.code;
  const runCode = (runId: string) => rows.run.get(runId)!.code;
  const places = circuitPlaces(rows);
  const kept = <T extends 'source' | 'run' | 'transformer' | 'load'>(table: T): Row<T>[] =>
    inOrder(rows[table].values() as Iterable<Row<T>>).filter((row) => selection.has(table, row.id));

  const buses = inOrder(rows.bus.values()).filter(
    (bus) => selection.isFed(bus.id) && selection.has('bus', bus.id),
  );
  const place = new Map(buses.map((bus, i) => [bus.id, i]));
  const sources = kept('source');
  const runs = kept('run');
  const transformers = kept('transformer');
  const loads = kept('load');
  const panels = [...rows.panel.values()]
    .filter((panel) => place.has(panel.busId) && selection.has('panel', panel.id))
    .sort((a, b) => place.get(a.busId)! - place.get(b.busId)! || (a.id < b.id ? -1 : 1));
  const ofPanel = panelSheets(places, runs, selection);
  const sheets = panels.map((panel) => ofPanel.get(panel.id) ?? { entries: [], rows: [] });
  const conductors = [...rows.conductor.values()]
    .filter((row) => selection.has('conductor', row.id))
    .sort((a, b) => (a.name < b.name ? -1 : 1));
  const readings = [...rows.reading.values()]
    .filter((row) => place.has(row.busId) && selection.has('reading', row.id))
    .sort((a, b) => (a.at < b.at ? -1 : a.at > b.at ? 1 : a.id < b.id ? -1 : 1));

  const job: Job = {
    format: 'farlug-job/1',
    name: header.name,
    address: header.address,
    frequency: Number(header.frequency),
    basis: header.basis,
    angle: header.angle,
    lengthUnit: header.lengthUnit,
    limits: limitsFromRows(rows),
    sources: sources.map((row) => sourceEntry(row, codeOf)),
    buses: buses.map(busEntry),
    runs: runs.map((row) =>
      runEntry(row, codeOf, header.lengthUnit, places.get(row.circuitId ?? '') ?? null),
    ),
    transformers: transformers.map((row) => transformerEntry(row, codeOf)),
    loads: loads.map((row) => loadEntry(row, codeOf, runCode)),
    panels: panels.map((panel, i) => panelEntry(panel, codeOf, sheets[i]!.entries)),
    conductorRows: conductors.map(conductorEntry),
    readings: readings.map((row) => readingEntry(row, codeOf)),
  };
  const placed = (row: Row<'run'> | Row<'load'>): [string, Placed] => [
    row.code,
    {
      row: row.id,
      circuitId: row.circuitId,
      panelId: rows.circuit.get(row.circuitId ?? '')?.panelId ?? null,
    },
  ];
  const idOf = (row: { id: string }) => row.id;
  const byCode = (list: readonly { code: string; id: string }[]) =>
    new Map(list.map((row) => [row.code, row.id]));
  const index: JobIndex = {
    sources: sources.map(idOf),
    buses: buses.map(idOf),
    runs: runs.map(idOf),
    transformers: transformers.map(idOf),
    loads: loads.map(idOf),
    panels: panels.map(idOf),
    panelCircuits: sheets.map((sheet) => sheet.rows),
    conductorRows: conductors.map(idOf),
    readings: readings.map(idOf),
    runByCode: new Map(runs.map(placed)),
    loadByCode: new Map(loads.map(placed)),
    busByCode: byCode(buses),
    transformerByCode: byCode(transformers),
    sourceByCode: byCode(sources),
  };
  return { job, index };
}
