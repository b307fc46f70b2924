import type { RequestHandler } from 'express';
import helmet from 'helmet';
import type { Config } from '../config.ts';

/**
 * Only files of this origin run, as pages or workers. Styles may stand in the page, because dialogs lock the page's
 * scrolling by a style element of their own; scripts may not.
 */
export function securityHeaders(config: Config): RequestHandler {
  const overHttps = config.publicUrl.startsWith('https:');
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'none'"],
        scriptSrc: ["'self'"],
        workerSrc: ["'self'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        fontSrc: ["'self'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        connectSrc: ["'self'"],
        manifestSrc: ["'self'"],
        frameSrc: ["'self'", 'blob:'],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'self'"],
        ...(overHttps ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: overHttps,
    referrerPolicy: { policy: 'same-origin' },
    crossOriginOpenerPolicy: overHttps,
  });
}
