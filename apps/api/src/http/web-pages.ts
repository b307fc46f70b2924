import { existsSync } from 'node:fs';
import path from 'node:path';
import express, { type RequestHandler, Router } from 'express';

/** The built web: hashed files for ever, the page itself always asked for again, any other address the page. */
export function webPages(webDir: string): Router {
  const router = Router();
  router.use(
    '/assets',
    express.static(path.join(webDir, 'assets'), { immutable: true, maxAge: '365d', index: false }),
  );
  router.use('/assets', (_request, response) => {
    response.status(404).type('text/plain').send('There is no such file.');
  });
  router.use(express.static(webDir, { maxAge: 0, index: false }));
  router.get(/.*/, page(webDir));
  return router;
}

export function webIsBuilt(webDir: string): boolean {
  return existsSync(path.join(webDir, 'index.html'));
}

function page(webDir: string): RequestHandler {
  return (request, response, next) => {
    if (!request.accepts('html')) {
      next();
      return;
    }
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile('index.html', { root: webDir }, (error) => {
      if (error) next();
    });
  };
}
