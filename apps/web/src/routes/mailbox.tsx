export { MailboxPage as Component } from '../features/mailbox/components/mailbox-page.tsx';
