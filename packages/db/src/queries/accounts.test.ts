import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { makeFirm, makePerson, type TestFirm } from '../../test/factories.ts';
import type { FirmTransaction } from '../database.ts';
import { session } from '../schema/index.ts';
import { type TestDatabase, withTestDatabase } from '../testing/index.ts';
import { listAudit, recordAudit } from './audit.ts';
import {
  addMember,
  firmSettings,
  listMembers,
  removeMember,
  roleOf,
  saveFirmSettings,
  setMemberRole,
} from './firms.ts';
import {
  acceptInvitation,
  createInvitation,
  invitationOfToken,
  invitationToMail,
  listInvitations,
  withdrawInvitation,
} from './invitations.ts';
import { createPerson, membershipsOf, personByEmail, personById, setPassword } from './people.ts';
import { countAttempt, forgetAttempts, removeOldCounters, uncountAttempt } from './rate-counters.ts';
import { createToken, endTokensOf, tokenToMail, useToken } from './tokens.ts';

let database: TestDatabase;
let firm: TestFirm;
beforeAll(async () => {
  database = await withTestDatabase();
});
afterAll(() => database.close());
beforeEach(async () => {
  firm = await makeFirm(database.db);
});

const inFirm = <T>(run: (tx: FirmTransaction) => Promise<T>, of = firm) =>
  database.db.withFirm(of.firmId, of.personId, run);
const global: TestDatabase['db']['global'] = (run) => database.db.global(run);
const later = () => new Date(Date.now() + 3_600_000);
const earlier = () => new Date(Date.now() - 1000);

test('an address belongs to one person, whatever its case', async () => {
  const values = { id: randomUUID(), email: 'Ida@Alder.example', name: 'Ida', passwordHash: 'h' };
  expect(await global((tx) => createPerson(tx, values))).toBe(true);
  const other = { ...values, id: randomUUID(), email: 'ida@alder.EXAMPLE' };
  expect(await global((tx) => createPerson(tx, other))).toBe(false);
  expect(await global((tx) => personByEmail(tx, 'IDA@alder.example'))).toMatchObject({ id: values.id });
  expect(await global((tx) => personById(tx, values.id))).toMatchObject({ timeZone: 'UTC' });
  expect(await global((tx) => personByEmail(tx, 'nobody@alder.example'))).toBeNull();
});

test('a person sees their firms at sign-in, and nobody else’s', async () => {
  const second = await makeFirm(database.db, 'Briar Lighting');
  await inFirm((tx) => addMember(tx, firm.personId, 'estimator'), second);
  expect(await global((tx) => membershipsOf(tx, firm.personId))).toEqual([
    { firmId: firm.firmId, firmName: 'Alder & Finch Electric', role: 'admin' },
    { firmId: second.firmId, firmName: 'Briar Lighting', role: 'estimator' },
  ]);
  expect(await global((tx) => membershipsOf(tx, randomUUID()))).toEqual([]);
});

test('a new password ends the other sessions of the person alone', async () => {
  const sessions = { here: firm.personId, there: firm.personId, stranger: randomUUID() };
  await global((tx) =>
    tx.sql.insert(session).values(
      Object.entries(sessions).map(([sid, user]) => ({
        sid,
        sess: { passport: { user } },
        expire: later(),
      })),
    ),
  );
  await global((tx) => setPassword(tx, firm.personId, 'new hash', 'here'));
  const left = await global((tx) => tx.sql.select({ sid: session.sid }).from(session));
  expect(left.map(({ sid }) => sid).sort()).toEqual(['here', 'stranger']);
  expect(await global((tx) => personById(tx, firm.personId))).toMatchObject({ passwordHash: 'new hash' });
  await global((tx) => setPassword(tx, firm.personId, 'newer hash'));
  expect(await global((tx) => tx.sql.select().from(session))).toHaveLength(1);
});

describe('tokens', () => {
  const reset = (hash: string, expiresAt: Date) => ({
    id: randomUUID(),
    hash,
    purpose: 'reset' as const,
    personId: firm.personId,
    expiresAt,
  });

  test('are used once, in time and for their purpose', async () => {
    const [good, old] = [randomUUID(), randomUUID()];
    await global((tx) => createToken(tx, reset(good, later())));
    await global((tx) => createToken(tx, reset(old, earlier())));
    expect(await global((tx) => useToken(tx, old, 'reset'))).toBeNull();
    expect(await global((tx) => useToken(tx, good, 'invite'))).toBeNull();
    const uses = await Promise.all([1, 2, 3].map(() => global((tx) => useToken(tx, good, 'reset'))));
    expect(uses.filter((use) => use !== null)).toEqual([
      { personId: firm.personId, firmId: null, invitationId: null },
    ]);
  });

  test('are read by the worker by their id, and ended by the person', async () => {
    const values = reset(randomUUID(), later());
    await global((tx) => createToken(tx, values));
    expect(await database.worker.global((tx) => tokenToMail(tx, values.id))).toMatchObject({
      hash: values.hash,
      person: { id: firm.personId, name: 'Ida Marlow' },
      usedAt: null,
    });
    await global((tx) => endTokensOf(tx, firm.personId, 'reset'));
    expect(await global((tx) => useToken(tx, values.hash, 'reset'))).toBeNull();
  });
});

describe('members', () => {
  test('have one role each, and the last administrator stays', async () => {
    const second = await makePerson(database.db, 'Abel Quist');
    expect(await inFirm((tx) => addMember(tx, second, 'contractor'))).toBe(true);
    expect(await inFirm((tx) => addMember(tx, second, 'admin'))).toBe(false);
    expect(await inFirm((tx) => roleOf(tx, second))).toBe('contractor');
    expect((await inFirm((tx) => listMembers(tx))).map(({ name }) => name)).toEqual([
      'Abel Quist',
      'Ida Marlow',
    ]);
    expect(await inFirm((tx) => setMemberRole(tx, firm.personId, 'contractor'))).toBe('last-administrator');
    expect(await inFirm((tx) => removeMember(tx, firm.personId))).toBe('last-administrator');
    expect(await inFirm((tx) => setMemberRole(tx, second, 'admin'))).toBe('done');
    expect(await inFirm((tx) => removeMember(tx, firm.personId))).toBe('done');
    expect(await inFirm((tx) => removeMember(tx, firm.personId))).toBe('missing');
    expect(await inFirm((tx) => roleOf(tx, firm.personId))).toBeNull();
  });

  test('two administrators who remove each other at once leave one', async () => {
    const second = await makePerson(database.db);
    await inFirm((tx) => addMember(tx, second, 'admin'));
    const results = await Promise.all(
      [firm.personId, second].map((personId) => inFirm((tx) => removeMember(tx, personId))),
    );
    expect(results.sort()).toEqual(['done', 'last-administrator']);
  });

  test('a person keeps their membership in another firm', async () => {
    const second = await makeFirm(database.db, 'Briar Lighting');
    await inFirm((tx) => addMember(tx, firm.personId, 'estimator'), second);
    await inFirm((tx) => removeMember(tx, firm.personId), second);
    expect(await inFirm((tx) => roleOf(tx, firm.personId))).toBe('admin');
  });
});

test('the settings of a firm are its own', async () => {
  const settings = {
    name: 'Alder Electric',
    reportHeading: 'Alder Electric, Tannery Row',
    noticeWording: 'Ask us.',
    currency: 'EUR',
    lengthUnit: 'm' as const,
    wireUnit: 'mm2' as const,
  };
  const other = await makeFirm(database.db);
  await inFirm((tx) => saveFirmSettings(tx, settings));
  expect(await inFirm((tx) => firmSettings(tx))).toEqual(settings);
  expect(await inFirm((tx) => firmSettings(tx), other)).toMatchObject({ currency: 'USD' });
});

describe('invitations', () => {
  const invite = async (email: string, expiresAt = later()) => {
    const [id, hash] = [randomUUID(), randomUUID()];
    await inFirm(async (tx) => {
      await createInvitation(tx, { id, email, role: 'estimator', expiresAt, invitedBy: firm.personId });
      await createToken(tx, {
        id: randomUUID(),
        hash,
        purpose: 'invite',
        firmId: firm.firmId,
        invitationId: id,
        expiresAt,
      });
    });
    return { id, hash };
  };
  const byToken = (hash: string) => global((tx) => invitationOfToken(tx, hash));

  test('are found by their token before the firm is known', async () => {
    const { id, hash } = await invite('new@alder.example');
    expect(await byToken(hash)).toEqual({
      firmId: firm.firmId,
      firmName: 'Alder & Finch Electric',
      id,
      email: 'new@alder.example',
      role: 'estimator',
      expiresAt: expect.any(Date),
      state: 'open',
    });
    expect(await byToken(randomUUID())).toBeNull();
    const mailed = await database.worker.withFirm(firm.firmId, null, (tx) => invitationToMail(tx, id));
    expect(mailed).toMatchObject({ email: 'new@alder.example', open: true });
  });

  test('are accepted once', async () => {
    const { id, hash } = await invite('new@alder.example');
    expect(await inFirm((tx) => acceptInvitation(tx, id))).toBe(true);
    expect(await inFirm((tx) => acceptInvitation(tx, id))).toBe(false);
    expect(await byToken(hash)).toMatchObject({ state: 'accepted' });
    expect(await inFirm((tx) => listInvitations(tx))).toEqual([]);
  });

  test('end with their link when withdrawn or made anew', async () => {
    const first = await invite('new@alder.example');
    const second = await invite('NEW@alder.example');
    expect(await byToken(first.hash)).toBeNull();
    expect((await inFirm((tx) => listInvitations(tx))).map(({ id }) => id)).toEqual([second.id]);
    expect(await inFirm((tx) => withdrawInvitation(tx, second.id))).toBe(true);
    expect(await inFirm((tx) => withdrawInvitation(tx, second.id))).toBe(false);
    expect(await byToken(second.hash)).toBeNull();
  });

  test('expire', async () => {
    const { hash } = await invite('new@alder.example', earlier());
    expect(await byToken(hash)).toMatchObject({ state: 'expired' });
  });
});

test('the audit trail tells who did what, newest first, page by page', async () => {
  for (const subject of ['a', 'b', 'c']) await inFirm((tx) => recordAudit(tx, 'invited', subject));
  const events = await inFirm((tx) => listAudit(tx, { limit: 2 }));
  expect(events.map(({ subject, person }) => [subject, person])).toEqual([
    ['c', 'Ida Marlow'],
    ['b', 'Ida Marlow'],
  ]);
  const next = await inFirm((tx) => listAudit(tx, { before: events[1]!.at }));
  expect(next.map(({ subject }) => subject)).toEqual(['a']);
});

test('attempts are counted together, by key and window', async () => {
  const key = randomUUID();
  const counts = await Promise.all([1, 2, 3].map(() => global((tx) => countAttempt(tx, key, 3600))));
  expect(counts.map(({ hits }) => hits).sort()).toEqual([1, 2, 3]);
  expect(counts[0]!.endsAt.getTime()).toBeGreaterThan(Date.now());
  await global((tx) => uncountAttempt(tx, key, 3600));
  expect(await global((tx) => countAttempt(tx, key, 3600))).toMatchObject({ hits: 3 });
  expect(await global((tx) => countAttempt(tx, `${key} other`, 3600))).toMatchObject({ hits: 1 });
  await global((tx) => forgetAttempts(tx, key));
  expect(await global((tx) => countAttempt(tx, key, 3600))).toMatchObject({ hits: 1 });
  await global((tx) =>
    tx.sql.execute(sql`update rate_counter set window_start = now() - interval '2 days' where key = ${key}`),
  );
  await global((tx) => removeOldCounters(tx));
  expect(await database.asOwner('select 1 from rate_counter where key = $1', [key])).toEqual([]);
});
