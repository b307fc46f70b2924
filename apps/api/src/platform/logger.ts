import { type DestinationStream, type Logger, pino } from 'pino';

export type { Logger } from 'pino';

/** Tokens travel in bodies and fragments, never in paths; cookies and the CSRF header are cut out here. */
const SECRET_PATHS = ['req.headers.cookie', 'req.headers["x-csrf-token"]', 'res.headers["set-cookie"]'];

export function createLogger(level: string, destination?: DestinationStream): Logger {
  const options = { level, redact: { paths: SECRET_PATHS, censor: '[cut]' } };
  return destination ? pino(options, destination) : pino(options);
}
