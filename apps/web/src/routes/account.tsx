export { AccountPage as Component } from '../features/accounts/components/account-page.tsx';
