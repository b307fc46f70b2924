import { randomUUID } from 'node:crypto';
import { archiveJob, issueRevision, recordDecision, renewLink, sendRevision } from '@farlug/contract/routes';
import type { ProvokeTable } from './exercise-errors.ts';
import { startTestApi } from './start-test-api.ts';
import {
  decisionBody,
  demoJob,
  inspectorOf,
  issueBody,
  issued,
  printed,
  queuedDelivery,
  sendBody,
  tooHeavy,
  withoutLength,
} from './test-report.ts';

const NO_TOKEN = 'x'.repeat(43);

/** What brings the routes of reports and inspection to each of their codes. */
export const REPORT_ERRORS: ProvokeTable = {
  issueRevision: {
    conflict: async ({ firm }) => {
      const at = await issued(firm, await demoJob(firm));
      const body = issueBody({ revision: at.revision, seq: 1 });
      return firm.admin.call(issueRevision, { params: at, body });
    },
    job_moved_on: async ({ firm }) =>
      firm.admin.call(issueRevision, { params: await demoJob(firm), body: issueBody({ seq: 3 }) }),
    incomplete: async ({ firm }) =>
      firm.admin.call(issueRevision, { params: await demoJob(firm, withoutLength), body: issueBody() }),
    unsolvable: async ({ firm }) =>
      firm.admin.call(issueRevision, { params: await demoJob(firm, tooHeavy), body: issueBody() }),
    archived: async ({ firm }) => {
      const params = await demoJob(firm);
      await firm.admin.call(archiveJob, { params, body: { archived: true } });
      return firm.admin.call(issueRevision, { params, body: issueBody() });
    },
  },
  downloadRevisionPdf: {
    unavailable: async ({ firm }, route) =>
      firm.admin.call(route, { params: { ...(await issued(firm, await demoJob(firm))) } }),
  },
  sendRevision: {
    conflict: async ({ api, firm }) => {
      const at = await queuedDelivery(api, firm);
      const body = sendBody({ delivery: at.delivery, recipientEmail: 'another@inspect.example' });
      return firm.admin.call(sendRevision, { params: at, body });
    },
  },
  resendDelivery: {
    conflict: async ({ api, firm }, route) =>
      firm.admin.call(route, { params: { ...(await queuedDelivery(api, firm)) } }),
  },
  renewLink: {
    conflict: async ({ api, firm }) => {
      const at = await queuedDelivery(api, firm);
      await api.database.worker.withFirm(at.firm, null, (tx) =>
        tx.sql.execute(`update delivery set state = 'sending' where id = '${at.delivery}'`),
      );
      return firm.admin.call(renewLink, { params: at, body: { linkDays: 7 } });
    },
  },
  recordPaperDecision: {
    conflict: async ({ api, firm }, route) => {
      const params = { ...(await printed(api, firm)) };
      const body = decisionBody();
      await firm.admin.call(route, { params, body });
      return firm.admin.call(route, { params, body: { ...body, comments: 'Otherwise.' } });
    },
  },
  openInspection: {
    link_gone: ({ api }, route) => api.client().call(route, { body: { token: NO_TOKEN } }),
  },
  getInspection: {
    link_gone: ({ api }, route) => api.client().call(route),
  },
  downloadInspectionPdf: {
    link_gone: ({ api }, route) => api.client().call(route),
    unavailable: async ({ api, firm }, route) => {
      const at = await queuedDelivery(api, firm, await issued(firm, await demoJob(firm)));
      return (await inspectorOf(api, at)).call(route);
    },
  },
  recordDecision: {
    invalid: async ({ api, firm }, route) =>
      (await inspectorOf(api, await queuedDelivery(api, firm))).call(route, { body: { nonsense: 1 } }),
    link_gone: ({ api }, route) => api.client().call(route, { body: decisionBody() }),
    conflict: async ({ api, firm }) => {
      const client = await inspectorOf(api, await queuedDelivery(api, firm));
      const body = decisionBody();
      await client.call(recordDecision, { body });
      return client.call(recordDecision, { body: { ...body, name: 'Somebody else' } });
    },
    too_many: async ({ api, firm }) => {
      const limited = await startTestApi({
        database: api.database,
        rateLimits: { ...api.deps.rateLimits, recordDecision: { hits: 1, windowS: 3600 } },
      });
      const client = await inspectorOf(limited, await queuedDelivery(api, firm));
      await client.call(recordDecision, { body: decisionBody({ id: randomUUID() }) });
      const answer = await client.call(recordDecision, { body: decisionBody({ id: randomUUID() }) });
      await limited.close();
      return answer;
    },
  },
};
