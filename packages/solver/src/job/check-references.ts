import type { Draft, Report } from './draft.ts';
import { eachOf } from './draft.ts';

type Raw = Record<string, unknown>;
const rawList = (json: unknown, key: string): Raw[] => {
  const list = (json as Raw | null)?.[key];
  return Array.isArray(list)
    ? list.map((entry) => (typeof entry === 'object' && entry !== null ? entry : {}))
    : [];
};

const WITH_ID = ['sources', 'buses', 'runs', 'transformers', 'loads'] as const;

/**
 * Ids used twice, and names that lead nowhere. Ids are taken from the raw entries, so that an entry that is faulty
 * elsewhere is still known by its id. A bus that anything names exists.
 */
export function checkReferences(json: unknown, draft: Draft, report: Report): void {
  for (const key of WITH_ID)
    unique(
      rawList(json, key).map((entry) => entry.id),
      (i, first) => report(`${key}[${i}].id`, `must be unique among ${key}; ${key}[${first}] has it already`),
    );
  unique(
    rawList(json, 'panels').map((entry) => entry.bus),
    (i, first) => report(`panels[${i}].bus`, `must be unique among panels; panels[${first}] has it already`),
  );
  unique(
    draft.conductorRows.map((row) => row && `${row.material} ${row.name}`),
    (i, first) =>
      report(
        `conductorRows[${i}].name`,
        `must be unique for its material; conductorRows[${first}] has it already`,
      ),
  );

  const runs = new Map(rawList(json, 'runs').map((run) => [run.id, run]));
  const buses = new Set<unknown>();
  for (const [key, fields] of BUS_NAMES)
    for (const entry of rawList(json, key)) for (const field of fields) buses.add(entry[field]);

  eachOf(draft.loads, ({ along }, i) => {
    if (along === null) return;
    const run = runs.get(along);
    if (!run) report(`loads[${i}].along`, `must be the id of a branch run; no run is called "${along}"`);
    else if (run.kind !== 'branch')
      report(`loads[${i}].along`, `must be the id of a branch run; "${along}" is a ${run.kind}`);
  });
  eachOf(draft.panels, (panel, i) => {
    if (!buses.has(panel.bus))
      report(`panels[${i}].bus`, `must be a bus of the job; nothing names "${panel.bus}"`);
    panel.circuits.forEach((circuit, k) => {
      if (circuit.run !== null && !runs.has(circuit.run))
        report(
          `panels[${i}].circuits[${k}].run`,
          `must be the id of a run; no run is called "${circuit.run}"`,
        );
    });
  });
  eachOf(draft.readings, ({ bus }, i) => {
    if (!buses.has(bus)) report(`readings[${i}].bus`, `must be a bus of the job; nothing names "${bus}"`);
  });
}

const BUS_NAMES = [
  ['buses', ['id']],
  ['sources', ['bus']],
  ['runs', ['from', 'to']],
  ['transformers', ['from', 'to']],
  ['loads', ['bus']],
] as const;

const unique = (values: readonly unknown[], twice: (index: number, first: number) => void): void => {
  const seen = new Map<string, number>();
  values.forEach((value, i) => {
    if (typeof value !== 'string') return;
    const first = seen.get(value);
    if (first === undefined) seen.set(value, i);
    else twice(i, first);
  });
};
