import { accountText as text } from '#shared/text/en/accounts.ts';
import { useCentre } from '../../lib/centre.ts';
import { Page } from '../../ui/page.tsx';
import { PasswordForm } from './components/password-form.tsx';
import { SignIns } from './components/sign-ins.tsx';

/** One's own account: the password, and where one is signed in. */
export function AccountPage() {
  const { me } = useCentre();
  return (
    <Page title={me?.name ?? text.title}>
      <div className="grid max-w-5xl gap-10 min-[901px]:grid-cols-2 min-[901px]:gap-14">
        <PasswordForm />
        <SignIns />
      </div>
    </Page>
  );
}
