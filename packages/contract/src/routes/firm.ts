import { z } from 'zod';
import { ADMIN, FIRM_ROLES, MEMBER, route } from '../route.ts';
import { conductorRow, limitRow } from '../rows/index.ts';
import { email, empty, exactText, firmParams, freeText, instant, name, none } from './common.ts';

/** A named set of limits; `clause` says where it stands, `force` whether it binds. */
export const presetBody = z.strictObject({
  name,
  clause: freeText(400).min(1, 'Say which clause or house rule the limits come from.'),
  force: z.enum(['recommendation', 'mandatory']),
  includeService: z.boolean(),
  includeTransformer: z.boolean(),
  includeSource: z.boolean(),
  longRun: z.boolean(),
  limits: z.array(limitRow.omit({ id: true })).max(60),
});
export const presetView = presetBody.extend({ id: z.uuid() });

export const firmSettings = z.strictObject({
  name,
  reportHeading: freeText(400),
  /** Added after the fixed notices, never in their place. */
  noticeWording: freeText(4000),
  currency: z.string().regex(/^[A-Z]{3}$/, 'Use a three-letter currency code, as USD.'),
  lengthUnit: z.enum(['ft', 'm']),
  wireUnit: z.enum(['awg', 'mm2']),
});

/** Values that new circuits start from; decimals as typed. Keys are those of the contract's `DEFAULTS`. */
export const defaultValues = z.record(exactText(60), exactText(80));

export const memberView = z.strictObject({
  personId: z.uuid(),
  name: z.string(),
  email: z.string(),
  role: z.enum(FIRM_ROLES),
});
export const pendingInvitation = z.strictObject({
  id: z.uuid(),
  email: z.string(),
  role: z.enum(FIRM_ROLES),
  expiresAt: instant,
});
export const firmView = z.strictObject({
  id: z.uuid(),
  settings: firmSettings,
  role: z.enum(FIRM_ROLES),
  members: z.array(memberView),
  invitations: z.array(pendingInvitation),
  presets: z.array(presetView),
  defaults: defaultValues,
  conductors: z.array(conductorRow),
});
export type FirmView = z.output<typeof firmView>;

export const getFirm = route({
  name: 'getFirm',
  method: 'GET',
  path: '/api/firms/:firm',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: firmParams,
  query: none,
  body: empty,
  response: firmView,
  errors: ['not_found'],
});
export const saveFirmSettings = route({
  name: 'saveFirmSettings',
  method: 'PUT',
  path: '/api/firms/:firm/settings',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams,
  query: none,
  body: firmSettings,
  response: firmView,
  errors: ['invalid', 'forbidden', 'not_found'],
});
export const saveFirmDefaults = route({
  name: 'saveFirmDefaults',
  method: 'PUT',
  path: '/api/firms/:firm/defaults',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams,
  query: none,
  body: defaultValues,
  response: firmView,
  errors: ['invalid', 'forbidden', 'not_found'],
});
export const inviteMember = route({
  name: 'inviteMember',
  method: 'POST',
  path: '/api/firms/:firm/invitations',
  access: ADMIN,
  kind: 'json',
  idempotent: false,
  params: firmParams,
  query: none,
  body: z.strictObject({ email, role: z.enum(FIRM_ROLES) }),
  response: firmView,
  errors: ['invalid', 'conflict', 'forbidden', 'not_found', 'too_many'],
});
export const withdrawInvitation = route({
  name: 'withdrawInvitation',
  method: 'DELETE',
  path: '/api/firms/:firm/invitations/:invitation',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams.extend({ invitation: z.uuid() }),
  query: none,
  body: empty,
  response: firmView,
  errors: ['forbidden', 'not_found'],
});
export const setMemberRole = route({
  name: 'setMemberRole',
  method: 'PUT',
  path: '/api/firms/:firm/members/:person',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams.extend({ person: z.uuid() }),
  query: none,
  body: z.strictObject({ role: z.enum(FIRM_ROLES) }),
  response: firmView,
  errors: ['invalid', 'conflict', 'forbidden', 'not_found'],
});
/** The last administrator cannot be removed (`conflict`). */
export const removeMember = route({
  name: 'removeMember',
  method: 'DELETE',
  path: '/api/firms/:firm/members/:person',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams.extend({ person: z.uuid() }),
  query: none,
  body: empty,
  response: firmView,
  errors: ['conflict', 'forbidden', 'not_found'],
});
export const savePreset = route({
  name: 'savePreset',
  method: 'PUT',
  path: '/api/firms/:firm/presets/:preset',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams.extend({ preset: z.uuid() }),
  query: none,
  body: presetBody,
  response: firmView,
  errors: ['invalid', 'forbidden', 'not_found'],
});
export const removePreset = route({
  name: 'removePreset',
  method: 'DELETE',
  path: '/api/firms/:firm/presets/:preset',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams.extend({ preset: z.uuid() }),
  query: none,
  body: empty,
  response: firmView,
  errors: ['forbidden', 'not_found'],
});
export const saveFirmConductor = route({
  name: 'saveFirmConductor',
  method: 'PUT',
  path: '/api/firms/:firm/conductors/:conductor',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams.extend({ conductor: z.uuid() }),
  query: none,
  body: conductorRow.omit({ id: true }),
  response: firmView,
  errors: ['invalid', 'conflict', 'forbidden', 'not_found'],
});
export const removeFirmConductor = route({
  name: 'removeFirmConductor',
  method: 'DELETE',
  path: '/api/firms/:firm/conductors/:conductor',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams.extend({ conductor: z.uuid() }),
  query: none,
  body: empty,
  response: firmView,
  errors: ['forbidden', 'not_found'],
});
export const firmAudit = route({
  name: 'firmAudit',
  method: 'GET',
  path: '/api/firms/:firm/audit',
  access: ADMIN,
  kind: 'json',
  idempotent: true,
  params: firmParams,
  query: z.strictObject({ before: instant.optional() }),
  body: empty,
  response: z.strictObject({
    events: z.array(
      z.strictObject({ at: instant, person: z.string().nullable(), what: z.string(), subject: z.string() }),
    ),
  }),
  errors: ['forbidden', 'not_found'],
});
