import type { JobSummary } from '@farlug/contract/routes';
import { decisionWord } from '../../../lib/decision-words.ts';
import { formatDay } from '../../../lib/format.ts';
import { revisionLetter } from '../../../lib/revision-letter.ts';

export function RevisionState({ revision }: { revision: JobSummary['revision'] }) {
  if (!revision) return <span className="text-ink-soft">none issued</span>;
  const decision =
    revision.decision === null ? 'no decision yet' : decisionWord(revision.decision).toLowerCase();
  return (
    <span>
      <b>{revisionLetter(revision.no)}</b>, {formatDay(revision.issuedAt)}
      <span className="block text-label text-ink-soft">{decision}</span>
    </span>
  );
}
