import type { Route } from '@farlug/contract/route';
import { getSession } from '@farlug/contract/routes';
import type { z } from 'zod';
import { ApiError, errorOf, unreachable } from './api-error.ts';
import { routeUrl } from './route-url.ts';

type IsEmpty<T> = [T] extends [undefined]
  ? true
  : keyof T extends never
    ? true
    : T extends Record<string, never>
      ? true
      : false;
type Part<Name extends string, S extends z.ZodType> =
  IsEmpty<NonNullable<z.input<S>>> extends true
    ? { [K in Name]?: undefined }
    : undefined extends z.input<S>
      ? { [K in Name]?: z.input<S> }
      : { [K in Name]: z.input<S> };

/** A body of `unknown` is an upload's: a form with a file. */
type BodyPart<R extends Route> =
  unknown extends z.input<R['body']> ? { body: FormData } : Part<'body', R['body']>;
export type CallArgs<R extends Route> = Part<'params', R['params']> &
  Part<'query', R['query']> &
  BodyPart<R> & { signal?: AbortSignal };
export type Answer<R extends Route> = z.output<R['response']>;
export type Outcome<R extends Route> = { ok: true; data: Answer<R> } | { ok: false; error: ApiError };

/** Sent back with every request that changes something; the session endpoint hands it out. */
let csrfToken: string | null = null;
export function keepCsrfToken(token: string): void {
  csrfToken = token;
}

/** Calls a route of the contract; what the server refuses is a value, not an exception. */
export async function call<R extends Route>(route: R, args: CallArgs<R>): Promise<Outcome<R>> {
  const first = await send(route, args);
  const stale = !first.ok && first.error.code === 'forbidden' && route.method !== 'GET' && csrfToken !== null;
  if (!stale) return first;
  const before: string | null = csrfToken;
  csrfToken = null;
  const token = await freshToken();
  return token === before ? first : send(route, args);
}

/** As `call`, for the query cache: throws the `ApiError`. */
export async function ask<R extends Route>(route: R, args: CallArgs<R>): Promise<Answer<R>> {
  const outcome = await call(route, args);
  if (outcome.ok) return outcome.data;
  throw outcome.error;
}

async function freshToken(): Promise<string | null> {
  if (csrfToken === null) {
    const session = await send(getSession, {});
    if (session.ok) csrfToken = session.data.csrfToken;
  }
  return csrfToken;
}

async function send<R extends Route>(route: R, args: CallArgs<R>): Promise<Outcome<R>> {
  const { params, query, body, signal } = args as {
    params?: Record<string, unknown>;
    query?: Record<string, unknown>;
    body?: unknown;
    signal?: AbortSignal;
  };
  const headers: Record<string, string> = { accept: 'application/json' };
  const init: RequestInit = { method: route.method, headers, credentials: 'same-origin' };
  if (signal) init.signal = signal;
  if (route.method !== 'GET') {
    const token = await freshToken();
    if (token) headers['x-csrf-token'] = token;
    if (body instanceof FormData) init.body = body;
    else {
      headers['content-type'] = 'application/json';
      init.body = JSON.stringify(body ?? {});
    }
  }
  let response: Response;
  try {
    response = await fetch(routeUrl(route, params, query), init);
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    return { ok: false, error: unreachable() };
  }
  const answer: unknown = await response.json().catch(() => undefined);
  if (!response.ok) return { ok: false, error: errorOf(response.status, answer) };
  const parsed = route.response.safeParse(answer);
  if (parsed.success) return { ok: true, data: parsed.data as Answer<R> };
  return {
    ok: false,
    error: new ApiError(
      'unreadable',
      `The server’s answer to ${route.name} is not what this page expects. Reload the page to get its newest version.`,
      response.status,
    ),
  };
}
