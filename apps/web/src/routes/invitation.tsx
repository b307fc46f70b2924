export { InvitationPage as Component } from '../features/accounts/components/invitation-page.tsx';
