import { randomUUID } from 'node:crypto';
import type { FirmRole } from '@farlug/contract/route';
import { freshPassword } from '@farlug/contract/routes';
import {
  acceptInvitation,
  addMember,
  createPerson,
  invitationOfToken,
  personByEmail,
  recordAudit,
  type TokenInvitation,
  useToken,
} from '@farlug/db';
import { hashPassword, passwordHolds } from '../../auth/passwords.ts';
import type { Deps } from '../../deps.ts';
import { tokenHash } from '../../platform/account-token.ts';
import type { Person } from '../../platform/caller.ts';
import { Refusal, refusalAsValue, refuse, refuseField } from '../../platform/refusal.ts';

export interface InvitationView {
  firmName: string;
  email: string;
  role: FirmRole;
  expiresAt: string;
  hasAccount: boolean;
}

export async function readInvitation(deps: Deps, token: string): Promise<InvitationView | Refusal> {
  const invitation = await openInvitation(deps, token);
  if (invitation instanceof Refusal) return invitation;
  const { firmName, email, role, expiresAt } = invitation;
  const person = await deps.db.global((tx) => personByEmail(tx, email));
  return { firmName, email, role, expiresAt: expiresAt.toISOString(), hasAccount: person !== null };
}

export interface Acceptance {
  token: string;
  name: string | null;
  password: string;
}

/** A person with an account proves it by its password; a new one chooses name and password. */
export async function accept(deps: Deps, acceptance: Acceptance): Promise<Person | Refusal> {
  const invitation = await openInvitation(deps, acceptance.token);
  if (invitation instanceof Refusal) return invitation;
  const known = await deps.db.global((tx) => personByEmail(tx, invitation.email));
  if (known !== null) {
    if (!(await passwordHolds(known.passwordHash, acceptance.password)))
      return refuseField('wrong_credentials', 'password', 'This is not the password of your account.');
    const { id, name, email } = known;
    return join(deps, acceptance.token, invitation, { id, name, email }, null);
  }
  const fresh = freshPassword.safeParse(acceptance.password);
  if (!fresh.success) return refuseField('invalid', 'password', fresh.error.issues[0]!.message);
  if (acceptance.name === null) return refuseField('invalid', 'name', 'Enter your name.');
  const person = { id: randomUUID(), name: acceptance.name, email: invitation.email };
  return join(deps, acceptance.token, invitation, person, await hashPassword(acceptance.password));
}

/** `passwordHash` makes the account. Together with the token's one use, so that nobody joins twice. */
function join(
  deps: Deps,
  token: string,
  { firmId, id, email, role }: TokenInvitation,
  person: Person,
  passwordHash: string | null,
): Promise<Person | Refusal> {
  return refusalAsValue(() =>
    deps.db.withFirm(firmId, person.id, async (tx) => {
      if ((await useToken(tx, tokenHash(token), 'invite')) === null || !(await acceptInvitation(tx, id)))
        throw gone('This invitation was accepted already.');
      if (passwordHash !== null && !(await createPerson(tx, { ...person, passwordHash })))
        throw refuseField(
          'wrong_credentials',
          'password',
          'This address has got an account: use its password.',
        );
      await addMember(tx, person.id, role);
      await recordAudit(tx, `joined as ${role}`, email);
      return person;
    }),
  );
}

async function openInvitation(deps: Deps, token: string): Promise<TokenInvitation | Refusal> {
  const invitation = await deps.db.global((tx) => invitationOfToken(tx, tokenHash(token)));
  switch (invitation?.state) {
    case 'open':
      return invitation;
    case 'accepted':
      return gone('This invitation was accepted already. Sign in.');
    case 'expired':
      return gone('This invitation is too old. Ask an administrator of the firm to invite you again.');
    default:
      return gone(
        'This invitation does not stand any more. Ask an administrator of the firm to invite you again.',
      );
  }
}

const gone = (message: string) => refuse('link_gone', message);
