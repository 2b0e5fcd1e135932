import { useForm } from 'react-hook-form';
import { accountContracts } from '#shared/contracts/accounts.ts';
import { accountText as text } from '#shared/text/en/accounts.ts';
import { Problem } from '../../../lib/api.ts';
import { formResolver, showRefusedFields } from '../../../lib/form.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Button } from '../../../ui/button.tsx';
import { Field, Input } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useChangePassword } from '../mutations.ts';

const NAMES = ['present', 'next'] as const;
const EMPTY = { present: '', next: '' };

/** A new password beside the present one; what is wrong stands beside its field. */
export function PasswordForm() {
  const change = useChangePassword();
  const { register, handleSubmit, setError, reset, formState } = useForm({ resolver: formResolver(accountContracts.changePassword.body), defaultValues: EMPTY });
  const submit = handleSubmit(async (body) => {
    try {
      await change.mutateAsync(body);
      reset(EMPTY);
      showToast(text.changed);
    } catch (error) {
      if (!(error instanceof Problem)) throw error;
      if (!showRefusedFields(error, NAMES, setError)) setError(error.code === 'password.wrong' ? 'present' : 'next', { type: 'server', message: sentenceOf(error) ?? '' });
    }
  });
  return (
    <section>
      <PartTitle>{text.password}</PartTitle>
      <form noValidate onSubmit={(event) => void submit(event)} className="flex max-w-96 flex-col gap-4 border-t border-rule pt-3">
        <Field label={text.present} error={formState.errors.present?.message}>{(c) => <Input {...c} {...register('present')} type="password" autoComplete="current-password" />}</Field>
        <Field label={text.next} hint={text.nextHint} error={formState.errors.next?.message}>{(c) => <Input {...c} {...register('next')} type="password" autoComplete="new-password" />}</Field>
        <p className="text-sm text-dim">{text.endsOthers}</p>
        <Button type="submit" kind="primary" busy={change.isPending} className="self-start">{text.change}</Button>
      </form>
    </section>
  );
}
