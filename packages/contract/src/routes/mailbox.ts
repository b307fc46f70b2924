import { z } from 'zod';
import { LOCAL, route } from '../route.ts';
import { empty, instant, none } from './common.ts';

export const mailSummary = z.strictObject({
  id: z.string(),
  from: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  at: instant,
});
export const listMail = route({
  name: 'listMail',
  method: 'GET',
  path: '/api/mailbox',
  access: LOCAL,
  kind: 'json',
  idempotent: true,
  params: none,
  query: none,
  body: empty,
  response: z.strictObject({ messages: z.array(mailSummary) }),
  errors: ['not_found'],
});
export const readMail = route({
  name: 'readMail',
  method: 'GET',
  path: '/api/mailbox/:message',
  access: LOCAL,
  kind: 'json',
  idempotent: true,
  params: z.strictObject({ message: z.string().max(200) }),
  query: none,
  body: empty,
  response: mailSummary.extend({
    text: z.string(),
    attachments: z.array(
      z.strictObject({ index: z.int(), name: z.string(), type: z.string(), bytes: z.int() }),
    ),
  }),
  errors: ['not_found'],
});
export const openAttachment = route({
  name: 'openAttachment',
  method: 'GET',
  path: '/api/mailbox/:message/attachments/:index',
  access: LOCAL,
  kind: 'file',
  idempotent: true,
  params: z.strictObject({ message: z.string().max(200), index: z.coerce.number().int().nonnegative() }),
  query: none,
  body: empty,
  response: z.unknown(),
  errors: ['not_found'],
});
