export { SignUpPage as Component } from '../features/accounts/components/sign-up-page.tsx';
