import type { FirmRole } from '@farlug/contract/route';
import { eq, sql } from 'drizzle-orm';
import type { Transaction } from '../database.ts';
import { person, session } from '../schema/index.ts';

export interface Person {
  id: string;
  email: string;
  name: string;
  timeZone: string;
}
export interface PersonWithPassword extends Person {
  passwordHash: string;
}
export interface PersonMembership {
  firmId: string;
  firmName: string;
  role: FirmRole;
}

const WITH_PASSWORD = {
  id: person.id,
  email: person.email,
  name: person.name,
  timeZone: person.timeZone,
  passwordHash: person.passwordHash,
};

/** Whatever the case of the address. */
export async function personByEmail(tx: Transaction, email: string): Promise<PersonWithPassword | null> {
  const [found] = await tx.sql
    .select(WITH_PASSWORD)
    .from(person)
    .where(eq(sql`lower(${person.email})`, email.toLowerCase()));
  return found ?? null;
}

export async function personById(tx: Transaction, id: string): Promise<PersonWithPassword | null> {
  const [found] = await tx.sql.select(WITH_PASSWORD).from(person).where(eq(person.id, id));
  return found ?? null;
}

/** False where the address is taken already. */
export async function createPerson(
  tx: Transaction,
  values: { id: string; email: string; name: string; passwordHash: string; timeZone?: string },
): Promise<boolean> {
  const made = await tx.sql.insert(person).values(values).onConflictDoNothing().returning({ id: person.id });
  return made.length > 0;
}

/** The new password ends every session of the person but `keepSessionId`. */
export async function setPassword(
  tx: Transaction,
  personId: string,
  passwordHash: string,
  keepSessionId: string | null = null,
): Promise<void> {
  await tx.sql.update(person).set({ passwordHash }).where(eq(person.id, personId));
  await tx.sql
    .delete(session)
    .where(
      sql`(${session.sess} -> 'passport' ->> 'user') = ${personId} and ${session.sid} is distinct from ${keepSessionId}`,
    );
}

/** The firms that a person belongs to, by name: one of the few questions that look across firms. */
export async function membershipsOf(tx: Transaction, personId: string): Promise<PersonMembership[]> {
  const { rows } = await tx.sql.execute<{ firm_id: string; firm_name: string; role: FirmRole }>(
    sql`select firm_id, firm_name, role from memberships_of(${personId})`,
  );
  return rows.map((row) => ({ firmId: row.firm_id, firmName: row.firm_name, role: row.role }));
}
