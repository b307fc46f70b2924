import type { ErrorBody } from '@farlug/contract/errors';
import type { Route } from '@farlug/contract/route';
import { getSession, type SessionView, signIn } from '@farlug/contract/routes';
import request from 'supertest';
import type { z } from 'zod';

export interface Sent<R extends Route> {
  params?: z.input<R['params']>;
  query?: z.input<R['query']>;
  body?: z.input<R['body']>;
  /** A file for a route of kind `upload`. */
  file?: { name: string; bytes: Buffer };
}
export interface Received<R extends Route> {
  status: number;
  headers: Record<string, string>;
  body: z.output<R['response']>;
  /** Of an answer that is an error. */
  error: ErrorBody['error'];
  bytes: Buffer;
}

/** A browser without a page: keeps cookies, and sends the CSRF token that the session told it. */
export class TestClient {
  readonly agent: ReturnType<typeof request.agent>;
  csrfToken = '';

  constructor(url: string) {
    this.agent = request.agent(url);
  }

  async call<R extends Route>(route: R, sent: Sent<R> = {}): Promise<Received<R>> {
    if (route.method !== 'GET' && this.csrfToken === '') await this.refresh();
    const method = route.method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
    const call = this.agent[method](pathOf(route, sent.params as Record<string, string> | undefined))
      .query((sent.query ?? {}) as Record<string, string>)
      .ok(() => true)
      .buffer(true);
    if (route.method !== 'GET') call.set('x-csrf-token', this.csrfToken);
    if (route.kind === 'file') call.parse(collect as never);
    if (sent.file) call.attach('file', sent.file.bytes, sent.file.name);
    else if (sent.body !== undefined) call.send(sent.body as object);
    const response = await call;
    const isBytes = Buffer.isBuffer(response.body);
    const body = isBytes && response.status >= 400 ? JSON.parse(response.body.toString()) : response.body;
    if (body?.csrfToken) this.csrfToken = body.csrfToken;
    return {
      status: response.status,
      headers: response.headers,
      body,
      error: body?.error,
      bytes: isBytes ? response.body : Buffer.alloc(0),
    };
  }

  /** What a page does when it opens. */
  async refresh(): Promise<SessionView> {
    return (await this.call(getSession)).body;
  }

  async signIn(email: string, password: string): Promise<SessionView> {
    const { status, body, error } = await this.call(signIn, { body: { email, password } });
    if (status !== 200) throw new Error(`${email} could not sign in: ${error.message}`);
    return body;
  }
}

export function pathOf(route: Route, params: Record<string, string> = {}): string {
  return route.path.replace(/:(\w+)/g, (_whole, name: string) => encodeURIComponent(String(params[name])));
}

function collect(response: NodeJS.ReadableStream, done: (error: Error | null, body: Buffer) => void): void {
  const parts: Buffer[] = [];
  response.on('data', (part: Buffer) => parts.push(part));
  response.on('end', () => done(null, Buffer.concat(parts)));
}
