import type { DeliveryView } from '@farlug/contract/routes';
import { useState } from 'react';
import { formatDay, formatMoment } from '../../../lib/format.ts';
import { Menu, type MenuItem } from '../../../ui/menu.tsx';
import { Message } from '../../../ui/message.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import type { ReportActions } from '../hooks/use-report-actions.ts';
import { RenewDialog } from './renew-dialog.tsx';

const STATE_WORDS: Record<DeliveryView['state'], string> = {
  queued: 'waiting to be sent',
  sending: 'being sent',
  sent: 'sent',
  failed: 'failed',
  uncertain: 'uncertain',
};
const LINK_WORDS: Record<DeliveryView['link'], string> = {
  open: 'open until',
  expired: 'expired',
  revoked: 'withdrawn',
};

interface DeliveriesProps {
  deliveries: readonly DeliveryView[];
  letter: string;
  actions: ReportActions | null;
}

/** To whom the revision went, whether it arrived and was opened, and how long the link works. */
export function Deliveries({ deliveries, letter, actions }: DeliveriesProps) {
  const [refused, setRefused] = useState<string | null>(null);
  const [renewing, setRenewing] = useState<DeliveryView | null>(null);
  if (deliveries.length === 0)
    return <p className="px-4 text-grid text-ink-soft">Not sent to anybody yet.</p>;
  const itemsOf = (delivery: DeliveryView, may: ReportActions): MenuItem[] => [
    ...(delivery.state === 'uncertain' || delivery.state === 'failed'
      ? [
          {
            label: 'Send once more',
            onSelect: async () => setRefused((await may.resend(delivery.id))?.message ?? null),
          },
        ]
      : []),
    { label: 'Renew the link', onSelect: () => setRenewing(delivery) },
    {
      label: 'Withdraw the link',
      danger: true,
      disabled: delivery.link !== 'open',
      onSelect: async () => setRefused((await may.revoke(delivery.id))?.message ?? null),
    },
  ];
  return (
    <>
      {refused && (
        <Message kind="wrong" className="mx-4 mb-2">
          {refused}
        </Message>
      )}
      <Table stacked caption={`Deliveries of revision ${letter}`}>
        <thead>
          <tr>
            <Th>Sent to</Th>
            <Th>Message</Th>
            <Th>Opened</Th>
            <Th>Link</Th>
            {actions && (
              <Th>
                <span className="sr-only">Actions</span>
              </Th>
            )}
          </tr>
        </thead>
        <tbody>
          {deliveries.map((delivery) => (
            <tr key={delivery.id}>
              <RowHead>
                {delivery.recipientName}
                <span className="block text-label font-normal text-ink-soft">{delivery.recipientEmail}</span>
              </RowHead>
              <Td label="Message">
                <DeliveryState delivery={delivery} />
              </Td>
              <Td label="Opened">
                {delivery.openedAt ? (
                  formatMoment(delivery.openedAt)
                ) : (
                  <span className="text-ink-soft">not yet</span>
                )}
              </Td>
              <Td label="Link">
                {LINK_WORDS[delivery.link]} {delivery.link === 'open' && formatDay(delivery.linkExpiresAt)}
              </Td>
              {actions && (
                <Td className="text-right">
                  <Menu
                    label="Actions"
                    name={`Actions for the delivery to ${delivery.recipientName}`}
                    items={itemsOf(delivery, actions)}
                  />
                </Td>
              )}
            </tr>
          ))}
        </tbody>
      </Table>
      {renewing && actions && (
        <RenewDialog
          delivery={renewing}
          onClose={() => setRenewing(null)}
          renew={(days) => actions.renew(renewing.id, days)}
        />
      )}
    </>
  );
}

function DeliveryState({ delivery }: { delivery: DeliveryView }) {
  const { state, sentAt, lastError, attempts } = delivery;
  const wrong = state === 'failed' || state === 'uncertain';
  return (
    <>
      <span className={wrong ? 'font-bold text-over' : undefined}>
        {wrong && <span aria-hidden="true">▲ </span>}
        {STATE_WORDS[state]}
      </span>
      {sentAt && state === 'sent' && (
        <span className="block text-label text-ink-soft">{formatMoment(sentAt)}</span>
      )}
      {state === 'uncertain' && (
        <span className="block max-w-72 text-label text-ink-soft">
          The connection broke while the message was going out: it may have arrived. It is not repeated by
          itself. Sending it once more uses the same message number, so that a second copy can be told from a
          new message.
        </span>
      )}
      {state === 'failed' && lastError && (
        <span className="block max-w-72 text-label text-ink-soft">
          After {attempts} {attempts === 1 ? 'attempt' : 'attempts'}: {lastError}
        </span>
      )}
    </>
  );
}
