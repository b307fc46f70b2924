import type { FirmRole } from '@farlug/contract/route';
import { and, asc, eq, sql } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { firm, membership, person } from '../schema/index.ts';

export interface FirmSettings {
  name: string;
  reportHeading: string;
  noticeWording: string;
  currency: string;
  lengthUnit: 'ft' | 'm';
  wireUnit: 'awg' | 'mm2';
}
export interface Member {
  personId: string;
  name: string;
  email: string;
  role: FirmRole;
}

/** Within `withFirm` of the new firm's own id. */
export async function createFirm(
  tx: FirmTransaction,
  settings: Pick<FirmSettings, 'name'> & Partial<FirmSettings>,
): Promise<void> {
  await tx.sql.insert(firm).values({ id: tx.firmId, ...settings });
}

export async function firmSettings(tx: FirmTransaction): Promise<FirmSettings | null> {
  const [found] = await tx.sql
    .select({
      name: firm.name,
      reportHeading: firm.reportHeading,
      noticeWording: firm.noticeWording,
      currency: firm.currency,
      lengthUnit: firm.lengthUnit,
      wireUnit: firm.wireUnit,
    })
    .from(firm)
    .where(eq(firm.id, tx.firmId));
  return found ?? null;
}

export async function saveFirmSettings(tx: FirmTransaction, settings: FirmSettings): Promise<void> {
  await tx.sql.update(firm).set(settings).where(eq(firm.id, tx.firmId));
}

const thisMember = (tx: FirmTransaction, personId: string) =>
  and(eq(membership.firmId, tx.firmId), eq(membership.personId, personId));

/** The role of a person in the firm; null for everybody else. */
export async function roleOf(tx: FirmTransaction, personId: string): Promise<FirmRole | null> {
  const [found] = await tx.sql
    .select({ role: membership.role })
    .from(membership)
    .where(thisMember(tx, personId));
  return found?.role ?? null;
}

export async function listMembers(tx: FirmTransaction): Promise<Member[]> {
  return tx.sql
    .select({
      personId: membership.personId,
      name: person.name,
      email: person.email,
      role: membership.role,
    })
    .from(membership)
    .innerJoin(person, eq(person.id, membership.personId))
    .where(eq(membership.firmId, tx.firmId))
    .orderBy(asc(person.name), asc(person.id));
}

/** False where the person is a member already. */
export async function addMember(tx: FirmTransaction, personId: string, role: FirmRole): Promise<boolean> {
  const added = await tx.sql
    .insert(membership)
    .values({ firmId: tx.firmId, personId, role })
    .onConflictDoNothing()
    .returning({ personId: membership.personId });
  return added.length > 0;
}

export type MemberResult = 'done' | 'missing' | 'last-administrator';

export async function setMemberRole(
  tx: FirmTransaction,
  personId: string,
  role: FirmRole,
): Promise<MemberResult> {
  const stays = await administratorStays(tx, personId, role);
  if (stays !== 'done') return stays;
  await tx.sql.update(membership).set({ role }).where(thisMember(tx, personId));
  return 'done';
}

export async function removeMember(tx: FirmTransaction, personId: string): Promise<MemberResult> {
  const stays = await administratorStays(tx, personId, null);
  if (stays !== 'done') return stays;
  await tx.sql.delete(membership).where(thisMember(tx, personId));
  return 'done';
}

/** Locks the firm, so that two administrators cannot remove each other at once. */
async function administratorStays(
  tx: FirmTransaction,
  personId: string,
  next: FirmRole | null,
): Promise<MemberResult> {
  await tx.sql.execute(sql`select 1 from ${firm} where ${firm.id} = ${tx.firmId} for update`);
  const members = await tx.sql
    .select({ personId: membership.personId, role: membership.role })
    .from(membership)
    .where(eq(membership.firmId, tx.firmId));
  const member = members.find((candidate) => candidate.personId === personId);
  if (member === undefined) return 'missing';
  const others = members.filter(({ role }) => role === 'admin').length - (member.role === 'admin' ? 1 : 0);
  return member.role === 'admin' && next !== 'admin' && others === 0 ? 'last-administrator' : 'done';
}
