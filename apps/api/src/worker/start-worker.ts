import { deliveriesLeftSending, markUncertain, startQueueWorker } from '@farlug/db';
import { renderRevision } from './render-report.ts';
import { sendAccountMail } from './send-account-mail.ts';
import { sendReport } from './send-report.ts';
import type { WorkerDeps } from './worker-deps.ts';

/** Longer than any message takes: what is still `sending` then was cut off. */
const CUT_OFF_MS = 180_000;
const LOOK_EVERY_MS = 30_000;

export interface Worker {
  stop: () => Promise<void>;
}

/** Takes work off all queues, and looks for deliveries that a worker was cut off in. */
export async function startWorker(deps: WorkerDeps, workerUrl: string): Promise<Worker> {
  const look = () =>
    settleCutOff(deps, new Date(Date.now() - CUT_OFF_MS)).catch((error: unknown) =>
      deps.log.warn({ err: error }, 'cut-off deliveries were not looked for'),
    );
  await look();
  const looking = setInterval(look, LOOK_EVERY_MS);
  const queues = await startQueueWorker(workerUrl, (error) => deps.log.error({ err: error }, 'queue'));
  await queues.work('render-report', (payload, attempt) => renderRevision(deps, payload, attempt));
  await queues.work('send-report', (payload, attempt) => sendReport(deps, payload, attempt));
  await queues.work('send-account-mail', (payload, attempt) => sendAccountMail(deps, payload, attempt));
  return {
    stop: async () => {
      clearInterval(looking);
      await queues.stop();
    },
  };
}

/** Deliveries that began to be sent before `since` and never ended: nobody knows how far they got. */
export async function settleCutOff({ db, log }: WorkerDeps, since: Date): Promise<void> {
  const left = await db.global((tx) => deliveriesLeftSending(tx, since));
  for (const { firmId, jobId, deliveryId } of left) {
    const reason = 'The program was cut off while the message went out.';
    await db.withFirm(firmId, null, (tx) => markUncertain(tx, jobId, deliveryId, reason));
    log.warn({ deliveryId }, 'a delivery was cut off and is uncertain');
  }
}
