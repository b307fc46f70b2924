export { SignInPage as Component } from '../features/accounts/components/sign-in-page.tsx';
