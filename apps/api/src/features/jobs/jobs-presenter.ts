import type { JobSummary, OpenJob } from '@farlug/contract/routes';
import type { ListedJob, OpenedJob, RecordedEdit } from '@farlug/db';

export function jobSummaryOf(job: ListedJob): JobSummary {
  return {
    ...job,
    changedAt: job.changedAt.toISOString(),
    archivedAt: job.archivedAt?.toISOString() ?? null,
    revision: job.revision && { ...job.revision, issuedAt: job.revision.issuedAt.toISOString() },
  };
}

export function openJobOf(job: OpenedJob): OpenJob {
  return { ...job, archivedAt: job.archivedAt?.toISOString() ?? null };
}

export function editOf(edit: RecordedEdit) {
  return { ...edit, at: edit.at.toISOString() };
}

/** A name that any file system takes, and that says which job it is. */
export function jobFileName(jobName: string): string {
  const stem = jobName
    .normalize('NFKD')
    .replace(/[^\p{L}\p{N}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 80);
  return `${stem || 'job'}.farlug.json`;
}
