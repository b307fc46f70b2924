import type { SessionView } from '@farlug/contract/routes';
import { useParams } from 'react-router-dom';
import { useSession } from './use-session.ts';

export type Person = NonNullable<SessionView['person']>;
export type Membership = SessionView['memberships'][number];

interface FirmStanding {
  person: Person;
  membership: Membership;
  firmId: string;
  /** May issue, send, withdraw and record decisions; the API decides, this only says it beforehand. */
  mayIssue: boolean;
  mayManage: boolean;
}

/** Who the signed-in person is in the firm of the address. Only inside the frame of a firm, which sees to both. */
export function useMembership(): FirmStanding {
  const { firm } = useParams();
  const session = useSession().data;
  const membership = session?.memberships.find((entry) => entry.firmId === firm);
  if (!session?.person || !membership) throw new Error('used outside the frame of a firm');
  return {
    person: session.person,
    membership,
    firmId: membership.firmId,
    mayIssue: membership.role !== 'estimator',
    mayManage: membership.role === 'admin',
  };
}
