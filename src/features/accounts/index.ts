export { AccountPage } from './account-page.tsx';
export { SignInPage } from './sign-in-page.tsx';
