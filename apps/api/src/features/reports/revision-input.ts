import type { JobFromRows } from '@farlug/contract/job';
import { NOTICES } from '@farlug/contract/notices';
import type { RevisionInput } from '@farlug/contract/routes';
import type { JobRows } from '@farlug/contract/rows';
import type { FirmSettings } from '@farlug/db';
import type { Scenario } from '@farlug/solver/job';
import { tableContents, tableSources } from '@farlug/solver/tables';
import { canonicalHash } from '../../platform/canonical-hash.ts';

export interface IssueFacts {
  rows: JobRows;
  built: JobFromRows;
  firm: FirmSettings;
  seq: number;
  scenario: Scenario;
  paper: RevisionInput['paper'];
  note: string;
  /** The panel whose node equations are written out, as its point in the job. */
  equationsPanel: string | null;
  issuedBy: string;
  issuedAt: Date;
  no: number;
}

/** Everything that a report stands on and prints, pinned: tables, limits and wording as they are today. */
export function revisionInputOf(facts: IssueFacts): RevisionInput {
  const { rows, built, firm } = facts;
  const job = [...rows.job.values()][0]!;
  return {
    format: 'farlug-revision/1',
    job: built.job,
    scenario: facts.scenario,
    seq: facts.seq,
    paper: facts.paper,
    note: facts.note,
    titleBlock: {
      firm: firm.name,
      heading: firm.reportHeading,
      job: job.name,
      address: job.address,
      building: job.building,
      area: job.area,
      codeEdition: job.codeEdition,
      authority: job.authority,
      permitNumber: job.permitNumber,
      issuedBy: facts.issuedBy,
      issuedAt: facts.issuedAt.toISOString(),
      revision: facts.no,
    },
    wireUnit: job.wireUnit,
    equationsPanel: facts.equationsPanel,
    assumed: built.assumed.map(({ table, code, field, value, reason }) => ({
      kind: table,
      id: code,
      field,
      text: `${value}: ${reason}`,
    })),
    overrides: [...rows.run.values()].flatMap(({ code, floorOverride }) =>
      floorOverride ? [{ run: code, reason: floorOverride }] : [],
    ),
    tables: pinnedTables(),
    lengths: [...rows.run.values()].flatMap(({ code, lengthState }) =>
      lengthState ? [{ run: code, state: lengthState }] : [],
    ),
    rowWords: rowWords(rows, built),
    notices: [...NOTICES],
    firmWording: firm.noticeWording,
  };
}

function pinnedTables(): RevisionInput['tables'] {
  const contents = tableContents();
  return tableSources().map(({ id, source }) => ({ id, source, sha256: canonicalHash(contents[id]) }));
}

function rowWords(rows: JobRows, { index }: JobFromRows): RevisionInput['rowWords'] {
  return index.panelCircuits.flatMap((circuits, panel) =>
    circuits.flatMap((circuitId, row) => {
      const circuit = rows.circuit.get(circuitId);
      if (!circuit) return [];
      const { room, loadType, notes } = circuit;
      const code = [...rows.run.values()].find((run) => run.circuitId === circuitId)?.code ?? '';
      return room || loadType || notes
        ? [{ panel, row, code, room: room ?? '', loadType: loadType ?? '', notes: notes ?? '' }]
        : [];
    }),
  );
}
