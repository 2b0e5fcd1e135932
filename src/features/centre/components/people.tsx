import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { accountContracts, MEMBER_ROLES, type MemberRole, type Person } from '#shared/contracts/accounts.ts';
import { roleText } from '#shared/text/en/accounts.ts';
import { settingsWords } from '#shared/text/en/centre-page.ts';
import { call } from '../../../lib/api.ts';
import { useCentre } from '../../../lib/centre.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input, Select } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { showToast } from '../../../ui/toast.tsx';
import { useChange } from '../mutations.ts';
import { peopleQuery } from '../queries.ts';
import { ShownOnce } from './shown-once.tsx';

const ROLE_OPTIONS = MEMBER_ROLES.map((role) => [role, roleText[role]] as const);
const roleOf = (value: string): MemberRole => MEMBER_ROLES.find((role) => role === value) ?? 'desk';

/** Who belongs to the centre, in which role. A new account's password is shown once. */
export function People() {
  const { slug } = useCentre();
  const list = useQuery(peopleQuery(slug));
  const [password, setPassword] = useState<string | null>(null);
  return (
    <section>
      <PartTitle note={list.data?.people.length}>{settingsWords.people}</PartTitle>
      <Refused>{sentenceOf(list.error)}</Refused>
      <ul>{list.data?.people.map((person) => <Line key={person.id} person={person} />)}</ul>
      <AddPerson onPassword={setPassword} />
      <ShownOnce what={settingsWords.oncePassword} secret={password} onDone={() => setPassword(null)} />
    </section>
  );
}

function Line({ person }: { person: Person }) {
  const { slug, me } = useCentre();
  const params = { centre: slug, person: person.id };
  const change = useChange(slug, (role: MemberRole) => call(accountContracts.changePerson, { params, body: { role, leagues: role === 'secretary' ? person.leagues : [] } }));
  const remove = useChange(slug, () => call(accountContracts.removePerson, { params }));
  const own = me?.id === person.id;
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_11rem_auto] items-center gap-3 border-t border-rule py-2 max-[900px]:grid-cols-[minmax(0,1fr)_auto]">
      <div className="min-w-0 max-[900px]:col-span-2">
        <b className="font-[640]">{person.name}</b>
        <span className="type-label block break-all">{person.email}</span>
      </div>
      <Select aria-label={settingsWords.roleOf(person.name)} disabled={own || change.isPending} value={person.role} options={ROLE_OPTIONS} onChange={(event) => change.mutate(roleOf(event.target.value))} />
      <Button kind="quiet" disabled={own} busy={remove.isPending} aria-label={settingsWords.removePerson(person.name)} onClick={() => remove.mutate(undefined)}>{settingsWords.remove}</Button>
      <div className="col-span-full"><Refused>{sentenceOf(change.error ?? remove.error)}</Refused></div>
    </li>
  );
}

function AddPerson({ onPassword }: { onPassword: (password: string) => void }) {
  const { slug } = useCentre();
  const add = useChange(slug, (body: { name: string; email: string; role: MemberRole; leagues: string[] }) => call(accountContracts.addPerson, { params: { centre: slug }, body }));
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = event.currentTarget;
    const read = (name: string) => String(new FormData(form).get(name) ?? '');
    add.mutate({ name: read('name'), email: read('email'), role: roleOf(read('role')), leagues: [] }, {
      onSuccess: (made) => {
        form.reset();
        showToast(settingsWords.personAdded(made.person.name));
        if (made.password !== null) onPassword(made.password);
      },
    });
  };
  const besides = ['name', 'email'].some((name) => fieldSentenceOf(add.error, name));
  return (
    <form noValidate onSubmit={submit} className="grid grid-cols-2 items-end gap-3 border-t border-rule pt-3">
      <Field label={settingsWords.name} error={fieldSentenceOf(add.error, 'name')}>{(c) => <Input {...c} name="name" maxLength={80} />}</Field>
      <Field label={settingsWords.email} error={fieldSentenceOf(add.error, 'email')}>{(c) => <Input {...c} name="email" type="email" />}</Field>
      <Field label={settingsWords.role}>{(c) => <Select {...c} name="role" defaultValue="desk" options={ROLE_OPTIONS} />}</Field>
      <Button type="submit" busy={add.isPending}>{settingsWords.addPerson}</Button>
      <div className="col-span-2"><Refused>{add.error && !besides ? sentenceOf(add.error) : null}</Refused></div>
    </form>
  );
}
