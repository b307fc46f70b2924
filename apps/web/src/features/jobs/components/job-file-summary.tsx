import type { Job, Warning } from '@farlug/solver/job';
import { formatCount } from '../../../lib/format.ts';
import { SYSTEM_WORDS } from '../../../lib/job-words.ts';
import { Particulars } from '../../../ui/key-values.tsx';

const WARNINGS_MAX = 12;

/** What a job file holds, before anything is made of it. */
export function JobFileSummary({
  fileName,
  job,
  warnings,
}: {
  fileName: string;
  job: Job;
  warnings: readonly Warning[];
}) {
  const services = job.sources
    .map((source) => `${SYSTEM_WORDS[source.system]}, ${source.volts} V`)
    .join('; ');
  return (
    <div className="max-w-200 px-4 py-3">
      <h2 className="text-title">{job.name}</h2>
      <p className="mb-2 text-label text-ink-soft">{fileName}: nothing is wrong with it.</p>
      <Particulars
        items={[
          ['Address', job.address ?? 'not stated'],
          ['Service', services || 'none'],
          ['Panels', formatCount(job.panels.length, 'panel')],
          ['Runs', formatCount(job.runs.length, 'run')],
          ['Loads', formatCount(job.loads.length, 'load')],
          ['Limits', job.limits.basis ?? 'not stated'],
        ]}
      />
      {warnings.length > 0 && (
        <details className="mt-3 text-grid">
          <summary className="min-h-11 content-center desk:min-h-0">
            {formatCount(warnings.length, 'remark')}; the job can be made all the same
          </summary>
          <ul className="mt-1 text-ink-soft">
            {warnings.slice(0, WARNINGS_MAX).map((warning) => (
              <li key={`${warning.at} ${warning.text}`}>
                <span className="font-code text-label">{warning.at}</span> {warning.text}
              </li>
            ))}
            {warnings.length > WARNINGS_MAX && <li>and {warnings.length - WARNINGS_MAX} more.</li>}
          </ul>
        </details>
      )}
    </div>
  );
}
