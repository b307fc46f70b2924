import {
  downloadRevisionInput,
  downloadRevisionPdf,
  issueRevision,
  listRevisions,
  recordPaperDecision,
  renewLink,
  resendDelivery,
  revokeLink,
  sendRevision,
} from '@farlug/contract/routes';
import type { Frame } from '../../http/frame.ts';
import * as decisions from './decisions-service.ts';
import * as deliveries from './deliveries-service.ts';
import * as issue from './issue-service.ts';
import * as reports from './reports-service.ts';

export function registerReports({ deps, mount }: Frame): void {
  mount(listRevisions, ({ member, params }) => reports.listReports(deps, member, params.job));
  mount(issueRevision, ({ member, params, body }) => issue.issueRevision(deps, member, params.job, body));
  mount(downloadRevisionPdf, ({ member, params }) =>
    reports.revisionPdf(deps, member, params.job, params.revision),
  );
  mount(downloadRevisionInput, ({ member, params }) =>
    reports.revisionInputFile(deps, member, params.job, params.revision),
  );
  mount(sendRevision, ({ member, params, body }) =>
    deliveries.sendRevision(deps, member, params.job, params.revision, body),
  );
  mount(resendDelivery, ({ member, params }) =>
    deliveries.resendDelivery(deps, member, params.job, params.delivery),
  );
  mount(renewLink, ({ member, params, body }) =>
    deliveries.renewLink(deps, member, params.job, params.delivery, body.linkDays),
  );
  mount(revokeLink, ({ member, params }) => deliveries.revokeLink(deps, member, params.job, params.delivery));
  mount(recordPaperDecision, ({ member, params, body }) =>
    decisions.enterPaperDecision(deps, member, params.job, params.revision, body),
  );
}
