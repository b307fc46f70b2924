import { jobFromRows, rowsFromJob } from '@farlug/contract/job';
import type { RevisionInput } from '@farlug/contract/routes';
import { rowsFromLists } from '@farlug/contract/rows';
import { revisionInputOf } from '../src/features/reports/revision-input.ts';
import { canonicalHash } from '../src/platform/canonical-hash.ts';
import type { RevisionFacts } from '../src/worker/worker-deps.ts';
import { demoFile } from './test-job.ts';

/** A demo job as a report would pin it. */
export function sampleRevision(
  name: 'tannery-row' | 'weaving-hall' | 'ridge-cabin',
  paper: RevisionInput['paper'] = 'letter',
): { input: RevisionInput; facts: RevisionFacts } {
  const rows = rowsFromLists(rowsFromJob(demoFile(name)));
  const input = revisionInputOf({
    rows,
    built: jobFromRows(rows),
    firm: {
      name: 'Tannery Row Electric',
      reportHeading: '',
      noticeWording: 'Figures are for the permit drawings of this revision only.',
      currency: 'USD',
      lengthUnit: 'ft',
      wireUnit: 'awg',
    },
    seq: 12,
    scenario: 'each-circuit',
    paper,
    note: '',
    equationsPanel: null,
    issuedBy: 'Ada Bream',
    issuedAt: new Date('2026-11-03T10:58:00Z'),
    no: 3,
  });
  return {
    input,
    facts: {
      revisionNo: 3,
      revisionLetter: 'C',
      sha256: canonicalHash(input),
      solverVersion: '0.1.0',
      issuedAt: input.titleBlock.issuedAt,
      issuedBy: input.titleBlock.issuedBy,
    },
  };
}
