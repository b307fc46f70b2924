import { randomUUID } from 'node:crypto';
import {
  addMember,
  createFirm,
  createPerson,
  createToken,
  endTokensOf,
  enqueue,
  membershipsOf,
  personByEmail,
  personById,
  recordAudit,
  setPassword,
  useToken,
} from '@farlug/db';
import { hashPassword, passwordHolds } from '../../auth/passwords.ts';
import type { Deps } from '../../deps.ts';
import { accountToken, tokenHash } from '../../platform/account-token.ts';
import type { Person } from '../../platform/caller.ts';
import { DONE, type Done } from '../../platform/done.ts';
import { type Refusal, refusalAsValue, refuse, refuseField } from '../../platform/refusal.ts';

const RESET_LINK_MS = 3600_000;

export function membershipsOfPerson(deps: Deps, personId: string) {
  return deps.db.global((tx) => membershipsOf(tx, personId));
}

export interface SignUp {
  name: string;
  email: string;
  password: string;
  firmName: string;
}

/** A new person, and a firm of which they are the first administrator. */
export async function signUp(
  deps: Deps,
  { name, email, password, firmName }: SignUp,
): Promise<Person | Refusal> {
  const person: Person = { id: randomUUID(), name, email };
  const passwordHash = await hashPassword(password);
  return refusalAsValue(() =>
    deps.db.withFirm(randomUUID(), person.id, async (tx) => {
      if (!(await createPerson(tx, { ...person, passwordHash })))
        throw refuseField(
          'conflict',
          'email',
          'This address has an account. Sign in, or reset the password if it is forgotten.',
        );
      await createFirm(tx, { name: firmName });
      await addMember(tx, person.id, 'admin');
      await recordAudit(tx, 'signed the firm up', firmName);
      return person;
    }),
  );
}

/** Mails a link where the address has an account; does and says nothing else where it has none. */
export async function requestReset(deps: Deps, email: string): Promise<void> {
  await deps.db.global(async (tx) => {
    const person = await personByEmail(tx, email);
    if (person === null) return;
    await endTokensOf(tx, person.id, 'reset');
    const id = randomUUID();
    await createToken(tx, {
      id,
      hash: tokenHash(accountToken(deps.config.linkSecret, id)),
      purpose: 'reset',
      personId: person.id,
      expiresAt: new Date(deps.now().getTime() + RESET_LINK_MS),
    });
    await enqueue(tx, 'send-account-mail', { tokenId: id });
  });
}

/** Works once; ends every session of the person. */
export async function resetPassword(deps: Deps, token: string, password: string): Promise<Done | Refusal> {
  const passwordHash = await hashPassword(password);
  return deps.db.global(async (tx) => {
    const used = await useToken(tx, tokenHash(token), 'reset');
    if (used?.personId == null)
      return refuse('link_gone', 'This link was used already or is too old. Ask for a new one.');
    await setPassword(tx, used.personId, passwordHash);
    return DONE;
  });
}

/** Ends every other session of the person, and any reset link that is still open. */
export async function changePassword(
  deps: Deps,
  {
    person,
    sessionId,
    current,
    password,
  }: { person: Person; sessionId: string; current: string; password: string },
): Promise<Done | Refusal> {
  const stored = await deps.db.global((tx) => personById(tx, person.id));
  if (!(await passwordHolds(stored?.passwordHash ?? null, current)))
    return refuseField('wrong_credentials', 'current', 'This is not your present password.');
  const passwordHash = await hashPassword(password);
  await deps.db.global(async (tx) => {
    await setPassword(tx, person.id, passwordHash, sessionId);
    await endTokensOf(tx, person.id, 'reset');
  });
  return DONE;
}
