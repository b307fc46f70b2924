import type { Route } from '@farlug/contract/route';
import type { Response } from 'express';
import type { FileAnswer } from '../platform/file-answer.ts';
import { parse } from './validation.ts';

export function sendJson(route: Route, answer: unknown, response: Response, check: boolean): void {
  if (check) {
    const parsed = parse(route.response, answer);
    if (!parsed.ok)
      throw new Error(
        `${route.name} answers what its contract does not say: ${parsed.details
          .map(({ path, message }) => `${path}: ${message}`)
          .join('; ')}`,
      );
  }
  response.setHeader('Cache-Control', 'no-store').json(answer);
}

export function sendFile(answer: FileAnswer, response: Response): void {
  const ascii = answer.name.replace(/[^\x20-\x7e]|["\\/]/g, '_');
  const place = answer.inline === true ? 'inline' : 'attachment';
  for (const [name, value] of Object.entries(answer.headers ?? {})) response.setHeader(name, value);
  response
    .setHeader('Cache-Control', 'no-store')
    .setHeader('Content-Type', answer.type)
    .setHeader(
      'Content-Disposition',
      `${place}; filename="${ascii}"; filename*=UTF-8''${encodeURIComponent(answer.name)}`,
    )
    .send(answer.bytes);
}
