import type { Access, FirmRole, Route } from '@farlug/contract/route';
import type { Request } from 'express';
import { memberRole } from '../auth/member-role.ts';
import type { Deps } from '../deps.ts';
import type { InspectionGrant, Member, Person } from '../platform/caller.ts';
import { type Refusal, refuse } from '../platform/refusal.ts';
import { parse } from './validation.ts';

export interface Admission {
  params: unknown;
  member: Member | null;
  inspection: InspectionGrant | null;
}

/** Whether the caller may use the route at all. What does not exist for the caller is not found. */
export async function admit(deps: Deps, route: Route, request: Request): Promise<Admission | Refusal> {
  const params = parse(route.params, request.params);
  if (!params.ok) return notHere();
  const admission: Admission = { params: params.value, member: null, inspection: null };
  const { access } = route;
  switch (access.kind) {
    case 'public':
      return admission;
    case 'local':
      return deps.config.local && isLoopback(request) ? admission : notHere();
    case 'session':
      return request.user ? admission : signInFirst();
    case 'member':
      return admitMember(deps, access, admission, request);
    case 'inspection': {
      const inspection = request.session.inspection ?? null;
      return inspection === null
        ? refuse('link_gone', 'Open the link from the e-mail again: this page needs it.')
        : { ...admission, inspection };
    }
  }
}

async function admitMember(
  deps: Deps,
  access: Extract<Access, { kind: 'member' }>,
  admission: Admission,
  request: Request,
): Promise<Admission | Refusal> {
  const person: Person | undefined = request.user;
  if (!person) return signInFirst();
  const firmId = (admission.params as { firm: string }).firm;
  const role = await memberRole(deps, firmId, person.id);
  if (role === null) return notHere();
  if (!access.roles.includes(role)) return refuse('forbidden', mayNot(role, access.roles));
  return { ...admission, member: { firmId, role, person } };
}

const signInFirst = () => refuse('sign_in_needed', 'Sign in first.');
const notHere = () => refuse('not_found', 'There is nothing at this address, or it is not yours to see.');

const ROLE_WORDS: Record<FirmRole, string> = {
  admin: 'an administrator',
  contractor: 'a contractor',
  estimator: 'an estimator',
};
const mayNot = (role: FirmRole, roles: readonly FirmRole[]) =>
  `This needs ${roles.map((one) => ROLE_WORDS[one]).join(' or ')} of the firm; you are ${ROLE_WORDS[role]}.`;

function isLoopback(request: Request): boolean {
  const address = request.socket.remoteAddress ?? '';
  return address === '::1' || address.replace(/^::ffff:/, '').startsWith('127.');
}
