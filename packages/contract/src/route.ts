import type { z } from 'zod';
import type { ErrorCode } from './errors.ts';

export const FIRM_ROLES = ['admin', 'contractor', 'estimator'] as const;
export type FirmRole = (typeof FIRM_ROLES)[number];

/**
 * Who may call: anyone, a signed-in person, a member of the firm in the path with one of the roles, the holder of
 * an inspection cookie, or anyone on loopback while the local flag is set.
 */
export type Access =
  | { kind: 'public' }
  | { kind: 'session' }
  | { kind: 'member'; roles: readonly FirmRole[] }
  | { kind: 'inspection' }
  | { kind: 'local' };

export type RouteKind = 'json' | 'file' | 'upload';

/** An API route as a value: the server mounts it, the browser calls it, the tests walk it. */
export interface Route<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Response extends z.ZodType = z.ZodType,
> {
  name: string;
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  /** Express syntax, as `/api/firms/:firm/jobs/:job`. */
  path: string;
  access: Access;
  kind: RouteKind;
  /** True where a repeated call with the same body has the effect of one. */
  idempotent: boolean;
  params: Params;
  query: Query;
  body: Body;
  response: Response;
  errors: readonly ErrorCode[];
}

export function route<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType, R extends z.ZodType>(
  value: Route<P, Q, B, R>,
): Route<P, Q, B, R> {
  return value;
}

export const EVERYONE: Access = { kind: 'public' };
export const SIGNED_IN: Access = { kind: 'session' };
export const INSPECTION: Access = { kind: 'inspection' };
export const LOCAL: Access = { kind: 'local' };
/** Anyone of the firm: reads and edits jobs. */
export const MEMBER: Access = { kind: 'member', roles: FIRM_ROLES };
/** Those who may issue, send, withdraw and record decisions: never an estimator. */
export const ISSUER: Access = { kind: 'member', roles: ['admin', 'contractor'] };
export const ADMIN: Access = { kind: 'member', roles: ['admin'] };
