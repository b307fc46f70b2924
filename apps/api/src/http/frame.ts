import type { Route } from '@farlug/contract/route';
import { json, type Request, type RequestHandler, type Response, Router } from 'express';
import type { Deps } from '../deps.ts';
import type { FileAnswer } from '../platform/file-answer.ts';
import { Refusal, refuse } from '../platform/refusal.ts';
import { type Admission, admit } from './admit.ts';
import type { Call, Handler } from './call.ts';
import { csrfHolds } from './csrf.ts';
import { sendRefusal } from './error-answer.ts';
import { limitersOf } from './limit-rate.ts';
import { sendFile, sendJson } from './send-answer.ts';
import { receiveUpload } from './upload.ts';
import { parse } from './validation.ts';

const SMALL_BODY = '256kb';
const LARGE_BODY = '24mb';

/** What a feature is handed to register its routes. */
export interface Frame {
  deps: Deps;
  router: Router;
  mounted: ReadonlySet<string>;
  mount: <R extends Route>(route: R, handler: Handler<R>) => void;
}

/**
 * Mounts routes from their contract values. In this order: path, caller, forged requests, rate, body, handler; so
 * that nothing is read from whoever may not send it.
 */
export function createFrame(deps: Deps): Frame {
  const router = Router();
  const mounted = new Set<string>();
  const mount = <R extends Route>(route: R, handler: Handler<R>): void => {
    if (mounted.has(route.name)) throw new Error(`${route.name} is mounted twice`);
    mounted.add(route.name);
    const admissions = new WeakMap<Request, Admission>();
    const gate: RequestHandler = async (request, _response, next) => {
      const admission = await admit(deps, route, request);
      if (admission instanceof Refusal) {
        next(admission);
        return;
      }
      if (route.method !== 'GET' && !csrfHolds(deps.config, request, request.user?.id ?? null)) {
        next(
          refuse('forbidden', 'This page was opened before you signed in or out. Reload it and try again.'),
        );
        return;
      }
      admissions.set(request, admission);
      next();
    };
    const run: RequestHandler = async (request, response) => {
      const call = callOf(route, admissions.get(request)!, request, response);
      if (call instanceof Refusal) {
        sendRefusal(call, request, response);
        return;
      }
      const answer = await handler(call);
      if (answer instanceof Refusal) answerRefusal(deps, route, answer, request, response);
      else if (route.kind === 'file') sendFile(answer as FileAnswer, response);
      else sendJson(route, answer, response, deps.config.checkResponses);
    };
    const method = route.method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
    const { byCaller, byEmail } = limitersOf(deps, route);
    router[method](route.path, gate, ...byCaller, ...bodyReaders(route), ...byEmail, run);
  };
  return { deps, router, mounted, mount };
}

function bodyReaders(route: Route): RequestHandler[] {
  if (route.method === 'GET') return [];
  if (route.kind === 'upload') return [receiveUpload()];
  return [json({ limit: route.errors.includes('too_large') ? LARGE_BODY : SMALL_BODY, strict: true })];
}

function callOf<R extends Route>(
  route: R,
  admission: Admission,
  request: Request,
  response: Response,
): Call<R> | Refusal {
  const query = parse(route.query, request.query);
  if (!query.ok) return refuse('bad_request', 'The address asks for what cannot be given.', query.details);
  const body = parse(route.body, route.kind === 'upload' ? undefined : request.body);
  if (!body.ok) {
    if (!route.errors.includes('invalid'))
      return refuse('bad_request', 'The body is not what was expected.', body.details);
    return refuse('invalid', wrongValues(body.details.length), body.details);
  }
  return {
    route,
    params: admission.params as Call<R>['params'],
    query: query.value as Call<R>['query'],
    body: body.value as Call<R>['body'],
    signedIn: request.user ?? null,
    get person() {
      return had(request.user, route);
    },
    get member() {
      return had(admission.member, route);
    },
    get inspection() {
      return had(admission.inspection, route);
    },
    upload: request.file ? { name: request.file.originalname, bytes: request.file.buffer } : null,
    log: request.log,
    request,
    response,
  };
}

function had<T>(value: T | null | undefined, route: Route): T {
  if (value == null) throw new Error(`${route.name} asks for a caller that its access does not promise`);
  return value;
}

const wrongValues = (count: number) =>
  count === 1
    ? 'One value is not usable; see what it should be.'
    : `${count} values are not usable; see what they should be.`;

function answerRefusal(
  deps: Deps,
  route: Route,
  refusal: Refusal,
  request: Request,
  response: Response,
): void {
  const promised = route.errors.includes(refusal.code);
  if (!promised && deps.config.checkResponses)
    throw new Error(
      `${route.name} refuses with ${refusal.code}, which its contract does not list: ${refusal.message}`,
    );
  sendRefusal(refusal, request, response);
}
