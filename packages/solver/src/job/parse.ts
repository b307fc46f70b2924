import { parseSize } from '../tables/size.ts';
import { checkDiversity } from './check-diversity.ts';
import { checkEntries, checkLimits } from './check-entries.ts';
import { checkReferences } from './check-references.ts';
import { checkFrequency, checkJoins, checkLoads } from './check-systems.ts';
import { checkTransformers } from './check-transformers.ts';
import { draftOf } from './draft.ts';
import { schemaProblems } from './problems.ts';
import type { Job } from './schema.ts';
import { jobSchema, limitsSchema } from './schema.ts';
import type { ParseOutcome, Problem } from './solution.ts';
import { busSystems } from './systems.ts';
import { jobWarnings } from './warnings.ts';

/**
 * Reads a job file (already parsed JSON): its schema, then everything that can be said without solving. Every
 * problem is reported, at paths such as `runs[3].length`; where the schema refuses an entry, the others are still
 * checked, except for what needs the whole network. Table sizes come back in canonical form (`12` as `12 AWG`).
 * What needs the solution (a bus without a path, a load that cannot be served) is left to the solver.
 */
export function parseJob(json: unknown): ParseOutcome<Job> {
  const problems: Problem[] = [];
  const report = (path: string, message: string) => problems.push({ path, message });
  const parsed = jobSchema.safeParse(json);
  if (!parsed.success) {
    for (const problem of schemaProblems(parsed.error.issues, json)) problems.push(problem);
    const draft = draftOf(json);
    checkReferences(json, draft, report);
    checkEntries(draft, frequencyOf(json), report);
    const limits = limitsSchema.safeParse((json as { limits?: unknown } | null)?.limits ?? {});
    if (limits.success) checkLimits(limits.data, report);
    return { ok: false, problems };
  }
  const job = parsed.data;
  checkReferences(job, job, report);
  checkEntries(job, job.frequency, report);
  checkLimits(job.limits, report);
  checkFrequency(job, report);
  if (problems.length > 0) return { ok: false, problems };
  const systems = busSystems(job);
  checkTransformers(job, systems, report);
  checkJoins(job, systems, report);
  checkLoads(job, systems, report);
  checkDiversity(job, report);
  if (problems.length > 0) return { ok: false, problems };
  return { ok: true, job: withCanonicalSizes(job), warnings: jobWarnings(job) };
}

const frequencyOf = (json: unknown): number => {
  const stated = (json as { frequency?: unknown } | null)?.frequency;
  return typeof stated === 'number' && stated >= 0 ? stated : 60;
};

const withCanonicalSizes = (job: Job): Job => {
  const own = new Set(job.conductorRows.map((row) => row.name));
  const known = new Map<string, string>();
  const canonical = (size: string | null): string | null => {
    if (size === null || own.has(size)) return size;
    let text = known.get(size);
    if (text === undefined) {
      const parsed = parseSize(size);
      text = parsed.ok ? parsed.size : size;
      known.set(size, text);
    }
    return text;
  };
  return {
    ...job,
    runs: job.runs.map((run) => ({
      ...run,
      size: canonical(run.size),
      neutralSize: canonical(run.neutralSize),
      groundingSize: canonical(run.groundingSize),
    })),
  };
};
