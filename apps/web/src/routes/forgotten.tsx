export { ForgottenPage as Component } from '../features/accounts/components/forgotten-page.tsx';
