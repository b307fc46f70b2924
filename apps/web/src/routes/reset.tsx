export { ResetPage as Component } from '../features/accounts/components/reset-page.tsx';
