import {
  acceptInvitation,
  changePassword,
  getFirm,
  getSession,
  inviteMember,
  readInvitation,
  requestPasswordReset,
  resetPassword,
  signIn,
  signOut,
  signUp,
} from '@farlug/contract/routes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startTestApi, type TestApi } from './start-test-api.ts';
import { invitationToken, joinFirm, PASSWORD, resetToken, signUpFirm } from './test-firm.ts';

let api: TestApi;
beforeAll(async () => {
  api = await startTestApi();
});
afterAll(() => api.close());

const sessionCookie = (headers: Record<string, string>): string =>
  /farlug-session=([^;]+)/.exec(String(headers['set-cookie'] ?? ''))?.[1] ?? '';

describe('signing up and in', () => {
  it('makes a firm with its first administrator, who is signed in', async () => {
    const { admin, adminEmail, firm } = await signUpFirm(api, 'Kiln Street Wiring');
    const session = await admin.refresh();
    expect(session.person).toMatchObject({ name: 'Ada Bream', email: adminEmail });
    expect(session.memberships).toEqual([{ firmId: firm, firmName: 'Kiln Street Wiring', role: 'admin' }]);
    expect(session.local).toBe(false);
  });

  it('knows an address whatever its case, and refuses to give it a second account', async () => {
    const { adminEmail } = await signUpFirm(api);
    const again = await api.client().call(signUp, {
      body: { name: 'Eve', email: adminEmail.toUpperCase(), password: PASSWORD, firmName: 'Other' },
    });
    expect(again).toMatchObject({ status: 409, error: { code: 'conflict', details: [{ path: 'email' }] } });
    const session = await api.client().signIn(adminEmail.toUpperCase(), PASSWORD);
    expect(session.person?.email).toBe(adminEmail);
  });

  it('answers a wrong password and an unknown address alike', async () => {
    const { adminEmail } = await signUpFirm(api);
    const wrong = await api.client().call(signIn, { body: { email: adminEmail, password: 'wrong' } });
    const nobody = await api
      .client()
      .call(signIn, { body: { email: 'nobody@firm.example', password: 'wrong' } });
    expect(wrong).toMatchObject({ status: 401, error: { code: 'wrong_credentials' } });
    expect({ ...nobody.error, requestId: '' }).toEqual({ ...wrong.error, requestId: '' });
  });

  it('gives a new session id at sign-in, so that one planted before is worth nothing', async () => {
    const { adminEmail } = await signUpFirm(api);
    const client = api.client();
    const first = sessionCookie(
      (await client.call(signIn, { body: { email: adminEmail, password: PASSWORD } })).headers,
    );
    const second = sessionCookie(
      (await client.call(signIn, { body: { email: adminEmail, password: PASSWORD } })).headers,
    );
    expect(first).not.toBe('');
    expect(second).not.toBe('');
    expect(second).not.toBe(first);
    const old = await api.client().agent.get(getSession.path).set('cookie', `farlug-session=${first}`);
    expect(old.body.person).toBeNull();
  });

  it('hands out cookies that no script reads and no other site sends', async () => {
    const client = api.client();
    const { adminEmail } = await signUpFirm(api);
    const { headers } = await client.call(signIn, { body: { email: adminEmail, password: PASSWORD } });
    const cookies = headers['set-cookie'] as unknown as string[];
    expect(cookies).toHaveLength(2);
    for (const cookie of cookies) expect(cookie).toMatch(/HttpOnly; SameSite=Lax|HttpOnly.*SameSite=Lax/);
  });

  it('ends the session on signing out', async () => {
    const { admin, firm } = await signUpFirm(api);
    expect(await admin.call(signOut)).toMatchObject({ status: 200, body: { ok: true } });
    expect((await admin.call(getSession)).body.person).toBeNull();
    expect(await admin.call(getFirm, { params: { firm } })).toMatchObject({
      status: 401,
      error: { code: 'sign_in_needed' },
    });
  });

  it.each([
    [{ name: ' ', email: 'a@b.example', password: PASSWORD, firmName: 'F' }, 'name', /Enter a name/],
    [
      { name: 'A', email: 'not an address', password: PASSWORD, firmName: 'F' },
      'email',
      /as name@firm\.example/,
    ],
    [{ name: 'A', email: 'a@b.example', password: 'short', firmName: 'F' }, 'password', /at least 12/],
  ])('says what is wrong with %o at its field', async (body, path, message) => {
    const { status, error } = await api.client().call(signUp, { body });
    expect(status).toBe(422);
    expect(error.code).toBe('invalid');
    expect(error.details).toEqual([{ path, message: expect.stringMatching(message) }]);
  });
});

describe('forgery', () => {
  it('refuses a change without the token, with another browser’s, and from another site', async () => {
    const { admin } = await signUpFirm(api);
    const stranger = api.client();
    await stranger.refresh();
    const signOutWith = (token: string | null, site?: string) => {
      const call = admin.agent.post(signOut.path);
      if (token !== null) call.set('x-csrf-token', token);
      if (site) call.set('sec-fetch-site', site);
      return call;
    };
    expect((await signOutWith(null)).body.error.code).toBe('forbidden');
    expect((await signOutWith(stranger.csrfToken)).body.error.code).toBe('forbidden');
    expect((await signOutWith(admin.csrfToken, 'cross-site')).body.error.code).toBe('forbidden');
    expect((await admin.refresh()).person).not.toBeNull();
    expect((await signOutWith(admin.csrfToken)).status).toBe(200);
  });

  it('takes no token from before signing in for one after it', async () => {
    const { adminEmail } = await signUpFirm(api);
    const client = api.client();
    await client.refresh();
    const before = client.csrfToken;
    await client.signIn(adminEmail, PASSWORD);
    expect(client.csrfToken).not.toBe(before);
    const answer = await client.agent.post(signOut.path).set('x-csrf-token', before);
    expect(answer.status).toBe(403);
  });
});

describe('passwords', () => {
  it('are kept as argon2id with 64 MiB and three passes', async () => {
    const { adminEmail } = await signUpFirm(api);
    const [row] = await api.database.asOwner('select password_hash from person where email = $1', [
      adminEmail,
    ]);
    expect(row?.password_hash).toMatch(/^\$argon2id\$v=19\$m=65536,t=3,p=1\$/);
  });

  it('are reset once by a mailed link, which ends every session', async () => {
    const { admin, adminEmail } = await signUpFirm(api);
    const client = api.client();
    expect((await client.call(requestPasswordReset, { body: { email: adminEmail } })).body).toEqual({
      ok: true,
    });
    const token = await resetToken(api, adminEmail);
    const fresh = 'aluminum in the riser';
    expect((await client.call(resetPassword, { body: { token, password: fresh } })).status).toBe(200);
    expect((await admin.refresh()).person).toBeNull();
    expect(await client.call(resetPassword, { body: { token, password: fresh } })).toMatchObject({
      status: 410,
      error: { code: 'link_gone' },
    });
    expect((await client.call(signIn, { body: { email: adminEmail, password: PASSWORD } })).status).toBe(401);
    expect((await client.signIn(adminEmail, fresh)).person?.email).toBe(adminEmail);
  });

  it('answers a request for an unknown address just as for a known one, and mails nothing', async () => {
    const before = await api.database.asOwner('select count(*) from token');
    const answer = await api.client().call(requestPasswordReset, { body: { email: 'nobody@firm.example' } });
    expect(answer).toMatchObject({ status: 200, body: { ok: true } });
    expect(await api.database.asOwner('select count(*) from token')).toEqual(before);
  });

  it('takes no reset link that is too old, or that a newer one has replaced', async () => {
    const { adminEmail } = await signUpFirm(api);
    const client = api.client();
    await client.call(requestPasswordReset, { body: { email: adminEmail } });
    const replaced = await resetToken(api, adminEmail);
    await client.call(requestPasswordReset, { body: { email: adminEmail } });
    const late = await resetToken(api, adminEmail);
    await api.database.asOwner(
      `update token set expires_at = now() - interval '1 second'
       where person_id = (select id from person where email = $1)`,
      [adminEmail],
    );
    for (const token of [replaced, late, 'x'.repeat(43)])
      expect((await client.call(resetPassword, { body: { token, password: PASSWORD } })).error.code).toBe(
        'link_gone',
      );
  });

  it('are changed by who knows the present one; every other session ends', async () => {
    const { admin, adminEmail } = await signUpFirm(api);
    const other = api.client();
    await other.signIn(adminEmail, PASSWORD);
    const fresh = 'a second good password';
    expect(await admin.call(changePassword, { body: { current: 'wrong', password: fresh } })).toMatchObject({
      status: 401,
      error: { code: 'wrong_credentials', details: [{ path: 'current' }] },
    });
    expect((await admin.call(changePassword, { body: { current: PASSWORD, password: fresh } })).status).toBe(
      200,
    );
    expect((await admin.refresh()).person).not.toBeNull();
    expect((await other.refresh()).person).toBeNull();
    expect(
      (await api.client().call(changePassword, { body: { current: 'a', password: fresh } })).status,
    ).toBe(401);
  });
});

describe('invitations', () => {
  it('bring a new person into the firm in the role that was given', async () => {
    const firm = await signUpFirm(api, 'Sluice Wiring');
    const { client } = await joinFirm(api, firm, 'estimator');
    const { memberships } = await client.refresh();
    expect(memberships).toEqual([{ firmId: firm.firm, firmName: 'Sluice Wiring', role: 'estimator' }]);
  });

  it('show what they are before anything is typed', async () => {
    const { firm, admin } = await signUpFirm(api, 'Sluice Wiring');
    await admin.call(inviteMember, {
      params: { firm },
      body: { email: 'new.person@firm.example', role: 'contractor' },
    });
    const token = await invitationToken(api, 'new.person@firm.example');
    expect((await api.client().call(readInvitation, { body: { token } })).body).toMatchObject({
      firmName: 'Sluice Wiring',
      email: 'new.person@firm.example',
      role: 'contractor',
      hasAccount: false,
    });
    expect(await api.client().call(readInvitation, { body: { token: 'x'.repeat(43) } })).toMatchObject({
      status: 410,
      error: { code: 'link_gone' },
    });
  });

  it('join a person who has an account by the account’s password, and work once', async () => {
    const first = await signUpFirm(api);
    const second = await signUpFirm(api, 'Second Firm');
    const { firm } = second;
    await second.admin.call(inviteMember, {
      params: { firm },
      body: { email: first.adminEmail, role: 'contractor' },
    });
    const token = await invitationToken(api, first.adminEmail);
    const client = api.client();
    expect((await client.call(readInvitation, { body: { token } })).body.hasAccount).toBe(true);
    const accept = (password: string) =>
      client.call(acceptInvitation, { body: { token, name: null, password } });
    expect((await accept('not the password')).error.code).toBe('wrong_credentials');
    expect((await accept(PASSWORD)).body.memberships.map(({ role }) => role).sort()).toEqual([
      'admin',
      'contractor',
    ]);
    expect((await accept(PASSWORD)).error.code).toBe('link_gone');
  });

  it('ask a new person for a name and a good password', async () => {
    const { firm, admin } = await signUpFirm(api);
    await admin.call(inviteMember, {
      params: { firm },
      body: { email: 'third@firm.example', role: 'contractor' },
    });
    const token = await invitationToken(api, 'third@firm.example');
    const accept = (name: string | null, password: string) =>
      api.client().call(acceptInvitation, { body: { token, name, password } });
    expect((await accept('Cy', 'short')).error.details).toMatchObject([{ path: 'password' }]);
    expect((await accept(null, PASSWORD)).error.details).toMatchObject([{ path: 'name' }]);
    expect((await accept('Cy', PASSWORD)).status).toBe(200);
  });
});
