import express, { type Express } from 'express';
import { authenticate } from './auth/authenticate.ts';
import type { Deps } from './deps.ts';
import { registerAccounts } from './features/accounts/accounts-routes.ts';
import { registerFirm } from './features/firm/firm-routes.ts';
import { registerInspection } from './features/inspection/inspection-routes.ts';
import { registerJobs } from './features/jobs/jobs-routes.ts';
import { registerMailbox } from './features/mailbox/mailbox-routes.ts';
import { registerReports } from './features/reports/reports-routes.ts';
import { registerSchedule } from './features/schedule/schedule-routes.ts';
import { answerErrors } from './http/error-answer.ts';
import { createFrame, type Frame } from './http/frame.ts';
import { health } from './http/health.ts';
import { requestLog } from './http/request-log.ts';
import { securityHeaders } from './http/security-headers.ts';
import { sessions } from './http/sessions.ts';
import { webPages } from './http/web-pages.ts';
import { refuse } from './platform/refusal.ts';

const FEATURES: readonly ((frame: Frame) => void)[] = [
  registerAccounts,
  registerFirm,
  registerJobs,
  registerSchedule,
  registerReports,
  registerInspection,
  registerMailbox,
];

/** Every feature's routes, mounted. */
export function mountFeatures(deps: Deps): Frame {
  const frame = createFrame(deps);
  for (const register of FEATURES) register(frame);
  return frame;
}

export function createApp(deps: Deps): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', deps.config.trustedProxies);
  app.set('query parser', 'simple');
  app.use(requestLog(deps.log));
  app.use(securityHeaders(deps.config));
  app.get('/healthz', health(deps));
  app.use('/api', sessions(deps), ...authenticate(deps));
  app.use(mountFeatures(deps).router);
  app.use('/api', (_request, _response, next) =>
    next(refuse('not_found', 'There is nothing at this address, or it is not yours to see.')),
  );
  app.use(webPages(deps.config.webDir));
  app.use((_request, _response, next) => next(refuse('not_found', 'There is no such page.')));
  app.use(answerErrors());
  return app;
}
