import type { JobSummary } from '@farlug/contract/routes';
import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { formatRecent } from '../../../lib/format.ts';
import { Menu, type MenuItem } from '../../../ui/menu.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { JobCounts, WorstDrop } from './job-verdict.tsx';
import { RevisionState } from './revision-state.tsx';

export interface JobListProps {
  firm: string;
  jobs: readonly JobSummary[];
  actionsOf: (job: JobSummary) => readonly MenuItem[];
}

export function JobsTable({ firm, jobs, actionsOf }: JobListProps) {
  return (
    <Table caption="Jobs">
      <thead>
        <tr>
          <Th>Job</Th>
          <Th numeric>Worst drop</Th>
          <Th>Circuits</Th>
          <Th>Verdicts</Th>
          <Th>Revision</Th>
          <Th>Changed</Th>
          <Th>
            <span className="sr-only">Actions</span>
          </Th>
        </tr>
      </thead>
      <tbody>
        {jobs.map((job) => (
          <tr key={job.id}>
            <RowHead>
              <Link to={paths.schedule(firm, job.id)} className="text-body text-ink">
                {job.name}
              </Link>
              {job.address && (
                <span className="block text-label font-normal text-ink-soft">{job.address}</span>
              )}
            </RowHead>
            <Td numeric>
              <WorstDrop job={job} />
            </Td>
            <Td>{job.circuits}</Td>
            <Td>
              <JobCounts job={job} />
            </Td>
            <Td>
              <RevisionState revision={job.revision} />
            </Td>
            <Td>
              {formatRecent(job.changedAt)}
              {job.changedBy && <span className="block text-label text-ink-soft">{job.changedBy}</span>}
            </Td>
            <Td className="text-right">
              <Menu label="Actions" name={`Actions for ${job.name}`} items={actionsOf(job)} />
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
