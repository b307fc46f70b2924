import type { Request } from 'express';
import type { Config } from '../config.ts';

/** Over https the prefix makes the browser hold the cookies to this host, path and https. */
export function cookieNames(config: Config): { session: string; csrf: string } {
  const prefix = config.publicUrl.startsWith('https:') ? '__Host-' : '';
  return { session: `${prefix}farlug-session`, csrf: `${prefix}farlug-csrf` };
}

export function readCookie(request: Request, name: string): string | undefined {
  for (const part of (request.headers.cookie ?? '').split(';')) {
    const at = part.indexOf('=');
    if (at > 0 && part.slice(0, at).trim() === name) return part.slice(at + 1).trim();
  }
  return undefined;
}
