import { type Job, jobSchema, type Problem } from '@farlug/solver/job';

/** What the checks of a job file say about a job that was made of rows. */
export function fileProblems(job: Job): Problem[] {
  const parsed = jobSchema.safeParse(job);
  if (parsed.success) return [];
  return parsed.error.issues.map((issue) => ({
    path: issue.path.reduce<string>(
      (path, key) =>
        typeof key === 'number' ? `${path}[${key}]` : path === '' ? String(key) : `${path}.${String(key)}`,
      '',
    ),
    message: issue.message,
  }));
}
