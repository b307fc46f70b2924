import {
  downloadInspectionPdf,
  getInspection,
  openInspection,
  recordDecision,
} from '@farlug/contract/routes';
import type { Frame } from '../../http/frame.ts';
import { DONE } from '../../platform/done.ts';
import { Refusal } from '../../platform/refusal.ts';
import * as inspection from './inspection-service.ts';

export function registerInspection({ deps, mount }: Frame): void {
  mount(openInspection, async ({ body, request }) => {
    const grant = await inspection.openLink(deps, body.token);
    if (grant instanceof Refusal) return grant;
    request.session.inspection = grant;
    return DONE;
  });
  mount(getInspection, (call) => inspection.inspectionOf(deps, call.inspection));
  mount(downloadInspectionPdf, (call) => inspection.inspectionPdf(deps, call.inspection));
  mount(recordDecision, (call) => inspection.decide(deps, call.inspection, call.body));
}
