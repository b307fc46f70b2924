import { randomUUID } from 'node:crypto';
import type { FirmRole } from '@farlug/contract/route';
import { acceptInvitation, inviteMember, signUp } from '@farlug/contract/routes';
import { accountToken } from '../src/platform/account-token.ts';
import type { TestApi } from './start-test-api.ts';
import type { TestClient } from './test-client.ts';

export const PASSWORD = 'copper at both ends';

export interface TestFirm {
  firm: string;
  admin: TestClient;
  adminId: string;
  adminEmail: string;
}

let made = 0;

/** A firm that signed itself up, and its administrator's browser. */
export async function signUpFirm(api: TestApi, firmName = 'Tannery Row Electric'): Promise<TestFirm> {
  made += 1;
  const admin = api.client();
  const adminEmail = `ada.${made}.${randomUUID().slice(0, 8)}@firm.example`;
  const { status, body } = await admin.call(signUp, {
    body: { name: 'Ada Bream', email: adminEmail, password: PASSWORD, firmName },
  });
  if (status !== 200) throw new Error(`signing up answered ${status}`);
  return { firm: body.memberships[0]!.firmId, admin, adminId: body.person!.id, adminEmail };
}

export interface TestMember {
  client: TestClient;
  id: string;
  email: string;
}

/** Somebody invited by the firm's administrator, who followed the link of the mail. */
export async function joinFirm(api: TestApi, { firm, admin }: TestFirm, role: FirmRole): Promise<TestMember> {
  const email = `${role}.${randomUUID().slice(0, 8)}@firm.example`;
  await admin.call(inviteMember, { params: { firm }, body: { email, role } });
  const client = api.client();
  const { status, body } = await client.call(acceptInvitation, {
    body: { token: await invitationToken(api, email), name: 'Bo Carver', password: PASSWORD },
  });
  if (status !== 200) throw new Error(`accepting the invitation answered ${status}`);
  return { client, id: body.person!.id, email };
}

/** The secret that the mailed link carries. */
export async function invitationToken(api: TestApi, email: string): Promise<string> {
  const rows = await api.database.asOwner(
    `select t.id from token t join invitation i on i.id = t.invitation_id
     where i.email = $1 order by t.created_at desc limit 1`,
    [email],
  );
  return accountToken(api.deps.config.linkSecret, String(rows[0]?.id));
}

export async function resetToken(api: TestApi, email: string): Promise<string> {
  const rows = await api.database.asOwner(
    `select t.id from token t join person p on p.id = t.person_id
     where p.email = $1 and t.purpose = 'reset' order by t.created_at desc limit 1`,
    [email],
  );
  return accountToken(api.deps.config.linkSecret, String(rows[0]?.id));
}
