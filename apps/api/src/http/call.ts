import type { Route } from '@farlug/contract/route';
import type { Request, Response } from 'express';
import type { z } from 'zod';
import type { InspectionGrant, Member, Person } from '../platform/caller.ts';
import type { FileAnswer } from '../platform/file-answer.ts';
import type { Logger } from '../platform/logger.ts';
import type { Refusal } from '../platform/refusal.ts';

/** A checked request: parsed by its route, its caller allowed. */
export interface Call<R extends Route = Route> {
  route: R;
  params: z.output<R['params']>;
  query: z.output<R['query']>;
  body: z.output<R['body']>;
  /** The signed-in person; a route for anyone may be called without. */
  signedIn: Person | null;
  /** Of a route for signed-in people; throws elsewhere. */
  person: Person;
  /** Of a route for members; throws elsewhere. */
  member: Member;
  /** Of a route for the holder of an inspection cookie; throws elsewhere. */
  inspection: InspectionGrant;
  /** The uploaded file of a route of kind `upload`. */
  upload: { name: string; bytes: Buffer } | null;
  log: Logger;
  request: Request;
  response: Response;
}

export type Answer<R extends Route> = R extends { kind: 'file' } ? FileAnswer : z.input<R['response']>;
export type Handler<R extends Route> = (call: Call<R>) => Promise<Answer<R> | FileAnswer | Refusal>;
