import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import type { Request, Response } from 'express';
import type { Config } from '../config.ts';
import { cookieNames, readCookie } from './cookies.ts';

/**
 * A random value in a cookie that no script reads, and its HMAC, bound to the signed-in person, in a header that
 * only a page of this origin can have been told.
 */
export function issueCsrfToken(
  config: Config,
  request: Request,
  response: Response,
  personId: string | null,
  fresh = false,
): string {
  const { csrf } = cookieNames(config);
  let nonce = fresh ? undefined : readCookie(request, csrf);
  if (nonce === undefined || !/^[A-Za-z0-9_-]{43}$/.test(nonce)) {
    nonce = randomBytes(32).toString('base64url');
    response.cookie(csrf, nonce, {
      httpOnly: true,
      sameSite: 'lax',
      secure: config.publicUrl.startsWith('https:'),
      path: '/',
    });
  }
  return tokenFor(config, nonce, personId);
}

export function csrfHolds(config: Config, request: Request, personId: string | null): boolean {
  if (request.headers['sec-fetch-site'] === 'cross-site') return false;
  const nonce = readCookie(request, cookieNames(config).csrf);
  const given = request.get('x-csrf-token');
  if (nonce === undefined || given === undefined) return false;
  const expected = Buffer.from(tokenFor(config, nonce, personId));
  const actual = Buffer.from(given);
  return expected.length === actual.length && timingSafeEqual(expected, actual);
}

function tokenFor(config: Config, nonce: string, personId: string | null): string {
  return createHmac('sha256', config.sessionSecret)
    .update(`csrf\0${nonce}\0${personId ?? ''}`)
    .digest('base64url');
}
