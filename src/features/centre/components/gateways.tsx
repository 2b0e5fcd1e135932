import { type FormEvent, useState } from 'react';
import { centreContracts, type GatewaySettings } from '#shared/contracts/centre.ts';
import { gatewayText } from '#shared/text/en/centre.ts';
import { settingsWords } from '#shared/text/en/centre-page.ts';
import { number } from '#shared/text/en/formats.ts';
import { call } from '../../../lib/api.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { fieldSentenceOf, sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Button } from '../../../ui/button.tsx';
import { Field, Input } from '../../../ui/field.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { useChange } from '../mutations.ts';
import { ShownOnce } from './shown-once.tsx';

/** What reports to this centre, what is wrong with it, and its keys (two may live at once, for changing over). */
export function Gateways({ gateways, edits }: { gateways: readonly GatewaySettings[]; edits: boolean }) {
  const { slug } = useCentre();
  const [key, setKey] = useState<string | null>(null);
  const add = useChange(slug, (name: string) => call(centreContracts.addGateway, { params: { centre: slug }, body: { name } }));
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = event.currentTarget;
    add.mutate(String(new FormData(form).get('name') ?? ''), {
      onSuccess: (made) => {
        setKey(made.key);
        form.reset();
      },
    });
  };
  const beside = fieldSentenceOf(add.error, 'name');
  return (
    <section>
      <PartTitle>{settingsWords.gateways}</PartTitle>
      {gateways.length === 0 ? <p className="border-t border-rule py-2 text-dim">{settingsWords.noGateway}</p> : null}
      <ul>
        {gateways.map((gateway) => (
          <Gateway key={gateway.id} gateway={gateway} edits={edits} onKey={setKey} />
        ))}
      </ul>
      {edits ? (
        <form noValidate onSubmit={submit} className="flex items-end gap-3 border-t border-rule pt-3">
          <Field className="grow" label={settingsWords.gatewayName} error={beside ?? (add.error ? sentenceOf(add.error) : null)}>{(c) => <Input {...c} name="name" maxLength={80} />}</Field>
          <Button type="submit" busy={add.isPending}>{settingsWords.addGateway}</Button>
        </form>
      ) : null}
      <ShownOnce what={settingsWords.onceKey} secret={key} onDone={() => setKey(null)} />
    </section>
  );
}

function Gateway({ gateway, edits, onKey }: { gateway: GatewaySettings; edits: boolean; onKey: (key: string) => void }) {
  const { slug } = useCentre();
  const { dayAndTime, timeWithSeconds } = useTimes();
  const params = { centre: slug, gateway: gateway.id };
  const addKey = useChange(slug, () => call(centreContracts.addKey, { params }));
  const revoke = useChange(slug, (key: string) => call(centreContracts.revokeKey, { params: { ...params, key } }));
  const wrong = [gateway.silent ? gatewayText.silent : null, gateway.missing, ...gateway.faults].filter((fault, i, all) => fault !== null && all.indexOf(fault) === i);
  return (
    <li className="border-t border-rule py-3">
      <p className="flex flex-wrap justify-between gap-x-4">
        <b className="type-name">{gateway.name}</b>
        <span className="type-label">
          {gateway.heardAt === null ? settingsWords.neverHeard : settingsWords.heard(timeWithSeconds(gateway.heardAt))}
          {gateway.queued ? ` · ${settingsWords.queued(number(gateway.queued))}` : null}
        </span>
      </p>
      {wrong.length > 0 ? <p className="text-sm font-[600] text-amber">{wrong.join('. ')}.</p> : null}
      <ul>
        {gateway.keys.map((key) => (
          <li key={key.id} className="flex min-h-10 items-center justify-between gap-4">
            <span className="text-dim">{settingsWords.keyMade(dayAndTime(key.createdAt))}</span>
            {edits ? <Button kind="quiet" busy={revoke.isPending} aria-label={settingsWords.revokeKey(gateway.name, dayAndTime(key.createdAt))} onClick={() => revoke.mutate(key.id)}>{settingsWords.revoke}</Button> : null}
          </li>
        ))}
      </ul>
      {edits && gateway.keys.length < 2 ? <Button busy={addKey.isPending} onClick={() => addKey.mutate(undefined, { onSuccess: (made) => onKey(made.key) })}>{settingsWords.addKey}</Button> : null}
      <Refused>{sentenceOf(addKey.error ?? revoke.error)}</Refused>
    </li>
  );
}
