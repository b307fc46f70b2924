import type { JobSummary } from '@farlug/contract/routes';
import { formatDay } from '../../../lib/format.ts';
import { revisionLetter } from '../../../lib/revision-letter.ts';

const DECISION_WORDS: Record<string, string> = {
  'no-exceptions': 'no exceptions',
  'corrections-needed': 'corrections needed',
  other: 'decided in other words',
};

export function RevisionState({ revision }: { revision: JobSummary['revision'] }) {
  if (!revision) return <span className="text-ink-soft">none issued</span>;
  const decision =
    revision.decision === null ? 'no decision yet' : (DECISION_WORDS[revision.decision] ?? revision.decision);
  return (
    <span>
      <b>{revisionLetter(revision.no)}</b>, {formatDay(revision.issuedAt)}
      <span className="block text-label text-ink-soft">{decision}</span>
    </span>
  );
}
