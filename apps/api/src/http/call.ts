import type { FirmRole, Route } from '@farlug/contract/route';
import type { Request, Response } from 'express';
import type { z } from 'zod';
import type { Logger } from '../platform/logger.ts';
import type { Refusal } from '../platform/refusal.ts';

export interface Person {
  id: string;
  name: string;
  email: string;
}

/** A signed-in person as one firm knows them. */
export interface Member {
  firmId: string;
  role: FirmRole;
  person: Person;
}

/** What an opened inspection link left in the browser's session. */
export interface InspectionGrant {
  firmId: string;
  deliveryId: string;
  epoch: number;
}

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

export interface FileAnswer {
  type: string;
  name: string;
  bytes: Buffer;
  /** Shown in the browser and not saved; only for types that cannot run script. */
  inline?: boolean;
  headers?: Record<string, string>;
}

export type Answer<R extends Route> = R extends { kind: 'file' } ? FileAnswer : z.input<R['response']>;
export type Handler<R extends Route> = (call: Call<R>) => Promise<Answer<R> | FileAnswer | Refusal>;
