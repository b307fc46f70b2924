import { FIRM_ROLES, type FirmRole } from '@farlug/contract/route';
import { useState } from 'react';
import type { ApiError } from '../../../lib/api-error.ts';
import { formatDay } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Message } from '../../../ui/message.tsx';
import { Select } from '../../../ui/select.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import type { FirmPartProps } from '../firm-part.ts';
import { ROLE_NAMES } from '../role-words.ts';
import { InviteForm } from './invite-form.tsx';
import { PartHeading } from './part-heading.tsx';

export function PeoplePart({ firm, actions, mayManage, self }: FirmPartProps & { self: string }) {
  const [refused, setRefused] = useState<string | null>(null);
  const [leaving, setLeaving] = useState<{ personId: string; name: string } | null>(null);
  const tell = async (asked: Promise<ApiError | null>) => setRefused((await asked)?.message ?? null);
  return (
    <>
      <PartHeading
        title="People"
        note="Who works in this firm. A role says what each may do; the server holds to it."
      />
      {refused && (
        <Message kind="wrong" className="mx-4 mb-2">
          {refused}
        </Message>
      )}
      <Table stacked caption="People of the firm">
        <thead>
          <tr>
            <Th>Name</Th>
            <Th>E-mail</Th>
            <Th>Role</Th>
            {mayManage && (
              <Th>
                <span className="sr-only">Actions</span>
              </Th>
            )}
          </tr>
        </thead>
        <tbody>
          {firm.members.map((member) => (
            <tr key={member.personId}>
              <RowHead>
                {member.name}
                {member.personId === self && <span className="font-normal text-ink-soft"> (you)</span>}
              </RowHead>
              <Td label="E-mail">{member.email}</Td>
              <Td label="Role">
                {mayManage ? (
                  <Select
                    bare
                    aria-label={`Role of ${member.name}`}
                    className="min-h-11 desk:min-h-0"
                    value={member.role}
                    onValue={(role: FirmRole) => void tell(actions.setRole(member.personId, role))}
                    choices={FIRM_ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }))}
                  />
                ) : (
                  ROLE_NAMES[member.role]
                )}
              </Td>
              {mayManage && (
                <Td className="text-right">
                  <Button look="bare" aria-label={`Remove ${member.name}`} onClick={() => setLeaving(member)}>
                    Remove
                  </Button>
                </Td>
              )}
            </tr>
          ))}
        </tbody>
      </Table>
      {firm.invitations.length > 0 && (
        <>
          <PartHeading title="Invited" note="Not accepted yet." />
          <Table stacked caption="Open invitations">
            <thead>
              <tr>
                <Th>E-mail</Th>
                <Th>Role</Th>
                <Th>Until</Th>
                {mayManage && (
                  <Th>
                    <span className="sr-only">Actions</span>
                  </Th>
                )}
              </tr>
            </thead>
            <tbody>
              {firm.invitations.map((invitation) => (
                <tr key={invitation.id}>
                  <RowHead>{invitation.email}</RowHead>
                  <Td label="Role">{ROLE_NAMES[invitation.role]}</Td>
                  <Td label="Until">{formatDay(invitation.expiresAt)}</Td>
                  {mayManage && (
                    <Td className="text-right">
                      <Button
                        look="bare"
                        aria-label={`Withdraw the invitation of ${invitation.email}`}
                        onClick={() => void tell(actions.withdraw(invitation.id))}
                      >
                        Withdraw
                      </Button>
                    </Td>
                  )}
                </tr>
              ))}
            </tbody>
          </Table>
        </>
      )}
      {mayManage && <InviteForm invite={actions.invite} />}
      <Dialog
        open={leaving !== null}
        onOpenChange={(open) => !open && setLeaving(null)}
        title={`Remove ${leaving?.name ?? ''} from the firm?`}
        description="They no longer see its jobs. What they issued and changed keeps their name."
        actions={
          <>
            <Button
              look="danger"
              big
              onClick={() => {
                if (leaving) void tell(actions.remove(leaving.personId));
                setLeaving(null);
              }}
            >
              Remove
            </Button>
            <Button big onClick={() => setLeaving(null)}>
              Keep
            </Button>
          </>
        }
      />
    </>
  );
}
