import { useForm } from 'react-hook-form';
import { useLocation, useNavigate, useSearchParams } from 'react-router-dom';
import { accountContracts } from '#shared/contracts/accounts.ts';
import { signInText as text } from '#shared/text/en/accounts.ts';
import { wording } from '#shared/text/en/app.ts';
import { knowsRefusal, refusalSentence } from '#shared/text/en/refusals.ts';
import { Problem } from '../../lib/api.ts';
import { formResolver, showRefusedFields } from '../../lib/form.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { Field, Input } from '../../ui/field.tsx';
import { useSignIn } from './mutations.ts';
import { nextPage } from './next-page.ts';

const NAMES = ['email', 'password'] as const;

/** Sign-in: two fields, the message beside the one that is wrong. */
export function SignInPage() {
  const because = useSearchParams()[0].get('because');
  return (
    <main id="page" className="mx-auto flex min-h-dvh w-full max-w-[27rem] flex-col justify-center px-6 py-12">
      <p className="type-name text-dim">{wording.product}</p>
      <h1 className="type-title mt-1 mb-8 text-[2rem] leading-tight">{text.title}</h1>
      {because !== null && knowsRefusal(because) ? <p role="status" className="mb-6 border-l-4 border-amber-fill pl-3">{refusalSentence(because)}</p> : null}
      <SignInForm />
      <p className="mt-10 border-t border-rule pt-4 text-sm text-dim">{text.noAccount}</p>
    </main>
  );
}

function SignInForm() {
  const signIn = useSignIn();
  const navigate = useNavigate();
  const { search } = useLocation();
  const { register, handleSubmit, setError, setFocus, resetField, formState } = useForm({ resolver: formResolver(accountContracts.signIn.body), defaultValues: { email: '', password: '' } });
  const submit = handleSubmit(async (body) => {
    try {
      await signIn.mutateAsync(body);
      await navigate(nextPage(search, window.location.origin), { replace: true });
    } catch (error) {
      if (!(error instanceof Problem)) throw error;
      if (showRefusedFields(error, NAMES, setError)) return;
      if (error.code === 'session.wrong') resetField('password');
      setError('password', { type: 'server', message: sentenceOf(error) ?? '' });
      setFocus('password');
    }
  });
  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-5">
      <Field label={text.email} error={formState.errors.email?.message}>
        {(control) => <Input {...control} {...register('email')} type="email" inputMode="email" autoComplete="username" autoCapitalize="none" spellCheck={false} className="min-h-hand" />}
      </Field>
      <Field label={text.password} error={formState.errors.password?.message}>
        {(control) => <Input {...control} {...register('password')} type="password" autoComplete="current-password" className="min-h-hand" />}
      </Field>
      <Button type="submit" kind="primary" size="hand" busy={signIn.isPending} className="mt-2">
        {signIn.isPending ? text.submitting : text.submit}
      </Button>
    </form>
  );
}
