import type { RequestHandler } from 'express';
import type { Deps } from '../deps.ts';
import { webIsBuilt } from './web-pages.ts';

/** 200 once a person could use the product: the database answers and the page is there. */
export function health({ config, db }: Deps): RequestHandler {
  return async (_request, response) => {
    const database = await db.ready();
    const web = webIsBuilt(config.webDir);
    response
      .status(database && web ? 200 : 503)
      .setHeader('Cache-Control', 'no-store')
      .json({ ok: database && web, database, web });
  };
}
