import { createHash } from 'node:crypto';
import type { Route } from '@farlug/contract/route';
import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { Deps } from '../deps.ts';
import { Refusal } from '../platform/refusal.ts';
import { RateCounterStore } from './rate-counter-store.ts';

interface Limiters {
  /** Before the body is read. */
  byCaller: RequestHandler[];
  /** After it. */
  byEmail: RequestHandler[];
}

/** The limiters of a route that may answer `too_many`; none for any other. */
export function limitersOf(deps: Deps, route: Route): Limiters {
  if (!route.errors.includes('too_many')) return { byCaller: [], byEmail: [] };
  const limit = deps.rateLimits[route.name];
  if (limit === undefined) throw new Error(`${route.name} may answer too_many but has no rate limit`);
  const limiter = (kind: string, hits: number, key: (request: Request) => string) =>
    rateLimit({
      windowMs: limit.windowS * 1000,
      limit: hits,
      standardHeaders: 'draft-8',
      legacyHeaders: false,
      skipSuccessfulRequests: limit.refusalsOnly === true,
      // Whether a proxy is believed is a setting of ours.
      validate: { xForwardedForHeader: false },
      identifier: `${route.name}-${kind}`,
      keyGenerator: (request) => key(request),
      store: new RateCounterStore(deps, `${route.name} ${kind}`),
      handler: (_request, _response, next) =>
        next(
          new Refusal(
            'too_many',
            `That was tried too often. Wait ${minutes(limit.windowS)} and try again.`,
            [],
            limit.windowS,
          ),
        ),
    });
  const { hits, hitsPerEmail } = limit;
  return {
    byCaller: [limiter('caller', hits, callerKey)],
    byEmail: hitsPerEmail === undefined ? [] : [limiter('email', hitsPerEmail, emailKey)],
  };
}

const minutes = (seconds: number) => {
  const count = Math.ceil(seconds / 60);
  return count === 1 ? 'a minute' : `${count} minutes`;
};

function callerKey(request: Request): string {
  return request.user?.id ?? ipKeyGenerator(request.ip ?? '');
}

function emailKey(request: Request): string {
  const { email } = (request.body ?? {}) as { email?: unknown };
  return typeof email === 'string'
    ? createHash('sha256').update(email.trim().toLowerCase()).digest('hex')
    : callerKey(request);
}
