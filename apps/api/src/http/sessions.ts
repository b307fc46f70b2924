import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import type { Deps } from '../deps.ts';
import { cookieNames } from './cookies.ts';

const WEEK_MS = 7 * 24 * 3600 * 1000;

/** Sessions live in PostgreSQL: a restart signs nobody out, and a changed password ends them. */
export function sessions({ config, db, log }: Deps): RequestHandler {
  const Store = connectPgSimple(session);
  return session({
    name: cookieNames(config).session,
    secret: config.sessionSecret,
    store: new Store({
      pool: db.sessionPool,
      tableName: 'session',
      createTableIfMissing: false,
      pruneSessionInterval: 3600,
      errorLog: (...values: unknown[]) => log.error({ values }, 'session store'),
    }),
    resave: false,
    saveUninitialized: false,
    rolling: true,
    proxy: config.trustedProxies > 0,
    cookie: {
      httpOnly: true,
      sameSite: 'lax',
      secure: config.publicUrl.startsWith('https:'),
      path: '/',
      maxAge: WEEK_MS,
    },
  });
}
