import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';
import { pinoHttp } from 'pino-http';
import type { Logger } from '../platform/logger.ts';

/** One line per request, with the number that an error answer quotes; the caller's own number is not believed. */
export function requestLog(log: Logger): RequestHandler {
  return pinoHttp({
    logger: log,
    genReqId: (_request, response) => {
      const id = randomUUID();
      response.setHeader('x-request-id', id);
      return id;
    },
    autoLogging: { ignore: (request) => request.url === '/healthz' },
    customLogLevel: (_request, response, error) => {
      if (error || response.statusCode >= 500) return 'warn';
      return response.statusCode >= 400 ? 'info' : 'debug';
    },
    serializers: {
      req: (request: { id: string; method: string; url: string }) => ({
        id: request.id,
        method: request.method,
        path: request.url.split('?')[0],
      }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
    },
  });
}
