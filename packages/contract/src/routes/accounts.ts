import { z } from 'zod';
import { EVERYONE, FIRM_ROLES, route, SIGNED_IN } from '../route.ts';
import { email, empty, freshPassword, instant, name, none, ok, token } from './common.ts';

export const membershipView = z.strictObject({
  firmId: z.uuid(),
  firmName: z.string(),
  role: z.enum(FIRM_ROLES),
});
export const sessionView = z.strictObject({
  person: z.strictObject({ id: z.uuid(), name: z.string(), email: z.string() }).nullable(),
  memberships: z.array(membershipView),
  /** True only where the product was started with its local mailbox and demo accounts. */
  local: z.boolean(),
  /** Sent back in the header `x-csrf-token` of every request that changes something. */
  csrfToken: z.string(),
});
export type SessionView = z.output<typeof sessionView>;

export const getSession = route({
  name: 'getSession',
  method: 'GET',
  path: '/api/session',
  access: EVERYONE,
  kind: 'json',
  idempotent: true,
  params: none,
  query: none,
  body: empty,
  response: sessionView,
  errors: [],
});

export const signUp = route({
  name: 'signUp',
  method: 'POST',
  path: '/api/sign-up',
  access: EVERYONE,
  kind: 'json',
  idempotent: false,
  params: none,
  query: none,
  body: z.strictObject({ name, email, password: freshPassword, firmName: name }),
  response: sessionView,
  errors: ['invalid', 'conflict', 'too_many'],
});

export const signIn = route({
  name: 'signIn',
  method: 'POST',
  path: '/api/sign-in',
  access: EVERYONE,
  kind: 'json',
  idempotent: false,
  params: none,
  query: none,
  body: z.strictObject({ email, password: z.string().min(1, 'Enter your password.').max(200) }),
  response: sessionView,
  errors: ['invalid', 'wrong_credentials', 'too_many'],
});

export const signOut = route({
  name: 'signOut',
  method: 'POST',
  path: '/api/sign-out',
  access: EVERYONE,
  kind: 'json',
  idempotent: true,
  params: none,
  query: none,
  body: empty,
  response: ok,
  errors: [],
});

/** Answers the same whether or not the address has an account. */
export const requestPasswordReset = route({
  name: 'requestPasswordReset',
  method: 'POST',
  path: '/api/password-reset-requests',
  access: EVERYONE,
  kind: 'json',
  idempotent: false,
  params: none,
  query: none,
  body: z.strictObject({ email }),
  response: ok,
  errors: ['invalid', 'too_many'],
});

export const resetPassword = route({
  name: 'resetPassword',
  method: 'POST',
  path: '/api/password-resets',
  access: EVERYONE,
  kind: 'json',
  idempotent: false,
  params: none,
  query: none,
  body: z.strictObject({ token, password: freshPassword }),
  response: ok,
  errors: ['invalid', 'link_gone', 'too_many'],
});

export const invitationView = z.strictObject({
  firmName: z.string(),
  email: z.string(),
  role: z.enum(FIRM_ROLES),
  expiresAt: instant,
  /** True where the address already has an account: the person signs in instead of choosing a password. */
  hasAccount: z.boolean(),
});
export const readInvitation = route({
  name: 'readInvitation',
  method: 'POST',
  path: '/api/invitations/read',
  access: EVERYONE,
  kind: 'json',
  idempotent: true,
  params: none,
  query: none,
  body: z.strictObject({ token }),
  response: invitationView,
  errors: ['invalid', 'link_gone', 'too_many'],
});

export const acceptInvitation = route({
  name: 'acceptInvitation',
  method: 'POST',
  path: '/api/invitations/accept',
  access: EVERYONE,
  kind: 'json',
  idempotent: false,
  params: none,
  query: none,
  /** A person with an account leaves name and sets the account's own password; a new one sets both. */
  body: z.strictObject({ token, name: name.nullable(), password: z.string().min(1).max(200) }),
  response: sessionView,
  errors: ['invalid', 'link_gone', 'wrong_credentials', 'too_many'],
});

export const changePassword = route({
  name: 'changePassword',
  method: 'POST',
  path: '/api/password',
  access: SIGNED_IN,
  kind: 'json',
  idempotent: false,
  params: none,
  query: none,
  body: z.strictObject({ current: z.string().min(1).max(200), password: freshPassword }),
  response: ok,
  errors: ['invalid', 'wrong_credentials', 'sign_in_needed', 'too_many'],
});
