import {
  archiveJob,
  createJob,
  deleteJob,
  downloadJobFile,
  duplicateJob,
  getJob,
  listEdits,
  listJobs,
  postEdit,
  reportVerdict,
} from '@farlug/contract/routes';
import type { Frame } from '../../http/frame.ts';
import { Refusal } from '../../platform/refusal.ts';
import * as edits from './edits-service.ts';
import * as jobs from './jobs-service.ts';

export function registerJobs({ deps, mount }: Frame): void {
  mount(listJobs, ({ member, query }) =>
    jobs.listJobs(deps, member, { search: query.search?.trim() ?? '', archived: query.archived === 'yes' }),
  );
  mount(createJob, ({ member, body }) => jobs.createJob(deps, member, body.rows));
  mount(getJob, ({ member, params }) => jobs.getJob(deps, member, params.job));
  mount(postEdit, ({ member, params, body }) => edits.postEdit(deps, member, params.job, body));
  mount(listEdits, ({ member, params, query }) => edits.listEdits(deps, member, params.job, query.since));
  mount(reportVerdict, ({ member, params, body }) => jobs.saveVerdict(deps, member, params.job, body));
  mount(duplicateJob, ({ member, params, body }) => jobs.duplicateJob(deps, member, params.job, body));
  mount(archiveJob, ({ member, params, body }) => jobs.archiveJob(deps, member, params.job, body.archived));
  mount(deleteJob, ({ member, params }) => jobs.deleteJob(deps, member, params.job));
  mount(downloadJobFile, async ({ member, params }) => {
    const file = await jobs.jobFile(deps, member, params.job);
    if (file instanceof Refusal) return file;
    return {
      name: file.name,
      type: 'application/json; charset=utf-8',
      bytes: Buffer.from(file.text),
      headers: { 'x-left-out': String(file.leftOut) },
    };
  });
}
