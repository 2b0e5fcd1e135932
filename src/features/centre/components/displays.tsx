import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { accountContracts } from '#shared/contracts/accounts.ts';
import { settingsWords } from '#shared/text/en/centre-page.ts';
import { call } from '../../../lib/api.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { useChange } from '../mutations.ts';
import { displaysQuery } from '../queries.ts';
import { ShownOnce } from './shown-once.tsx';

/** Links that open the wall on a screen without signing in; revoked, that screen loses it at once. */
export function Displays() {
  const { slug } = useCentre();
  const { dayAndTime } = useTimes();
  const list = useQuery(displaysQuery(slug));
  const [link, setLink] = useState<string | null>(null);
  const add = useChange(slug, (name: string) => call(accountContracts.addDisplay, { params: { centre: slug }, body: { name } }));
  const revoke = useChange(slug, (display: string) => call(accountContracts.removeDisplay, { params: { centre: slug, display } }));
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = event.currentTarget;
    add.mutate(String(new FormData(form).get('name') ?? ''), {
      onSuccess: (made) => {
        form.reset();
        setLink(new URL(made.path, window.location.href).href);
      },
    });
  };
  return (
    <section>
      <PartTitle>{settingsWords.displays}</PartTitle>
      {list.data?.displays.length === 0 ? <p className="border-t border-rule py-2 text-dim">{settingsWords.noDisplays}</p> : null}
      <ul>
        {list.data?.displays.map((display) => (
          <li key={display.id} className="flex items-center justify-between gap-4 border-t border-rule py-2">
            <div>
              <b className="font-[640]">{display.name}</b>
              <span className="type-label block">{display.seenAt === null ? settingsWords.neverSeen : settingsWords.seen(dayAndTime(display.seenAt))}</span>
            </div>
            <Button kind="quiet" busy={revoke.isPending} aria-label={settingsWords.revokeDisplay(display.name)} onClick={() => revoke.mutate(display.id)}>{settingsWords.revoke}</Button>
          </li>
        ))}
      </ul>
      <form noValidate onSubmit={submit} className="flex items-end gap-3 border-t border-rule pt-3">
        <Field className="grow" label={settingsWords.displayName} error={fieldSentenceOf(add.error, 'name')}>{(c) => <Input {...c} name="name" maxLength={60} />}</Field>
        <Button type="submit" busy={add.isPending}>{settingsWords.addDisplay}</Button>
      </form>
      <Refused>{sentenceOf(list.error ?? revoke.error)}</Refused>
      <ShownOnce what={settingsWords.onceLink} secret={link} onDone={() => setLink(null)} />
    </section>
  );
}
