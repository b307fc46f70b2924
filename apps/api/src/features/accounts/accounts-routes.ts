import {
  acceptInvitation,
  changePassword,
  getSession,
  readInvitation,
  requestPasswordReset,
  resetPassword,
  type SessionView,
  signIn,
  signOut,
  signUp,
} from '@farlug/contract/routes';
import { checkPassword, endSession, startSession } from '../../auth/authenticate.ts';
import type { Call } from '../../http/call.ts';
import { issueCsrfToken } from '../../http/csrf.ts';
import type { Frame } from '../../http/frame.ts';
import type { Person } from '../../platform/caller.ts';
import { DONE } from '../../platform/done.ts';
import { Refusal, refuse } from '../../platform/refusal.ts';
import * as accounts from './accounts-service.ts';
import { accept, readInvitation as openedInvitation } from './invitations-service.ts';

export function registerAccounts({ deps, mount }: Frame): void {
  const view = async (call: Call, person: Person | null, fresh: boolean): Promise<SessionView> => ({
    person,
    memberships: person ? await accounts.membershipsOfPerson(deps, person.id) : [],
    local: deps.config.local,
    csrfToken: issueCsrfToken(deps.config, call.request, call.response, person?.id ?? null, fresh),
  });
  const signedIn = async (call: Call, person: Person | Refusal): Promise<SessionView | Refusal> => {
    if (person instanceof Refusal) return person;
    await startSession(call.request, person);
    return view(call, person, true);
  };

  mount(getSession, (call) => view(call, call.signedIn, false));
  mount(signUp, async (call) => signedIn(call, await accounts.signUp(deps, call.body)));
  mount(signIn, async (call) => {
    const person = await checkPassword(deps, call.request);
    return signedIn(
      call,
      person ?? refuse('wrong_credentials', 'E-mail address and password do not go together.'),
    );
  });
  mount(signOut, async ({ request }) => {
    await endSession(request);
    return DONE;
  });
  mount(requestPasswordReset, async ({ body }) => {
    await accounts.requestReset(deps, body.email);
    return DONE;
  });
  mount(resetPassword, ({ body }) => accounts.resetPassword(deps, body.token, body.password));
  mount(readInvitation, ({ body }) => openedInvitation(deps, body.token));
  mount(acceptInvitation, async (call) => signedIn(call, await accept(deps, call.body)));
  mount(changePassword, ({ person, body, request }) =>
    accounts.changePassword(deps, { person, sessionId: request.sessionID, ...body }),
  );
}
