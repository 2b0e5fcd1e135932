import { useQueryClient } from '@tanstack/react-query';
import { useId } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import type { Identity } from '#shared/contracts/accounts.ts';
import { roleText } from '#shared/text/en/accounts.ts';
import { wording } from '#shared/text/en/app.ts';
import { useCentre } from '../../lib/centre.ts';
import { setLetterKeys, useLetterKeys } from '../../lib/keyboard.ts';
import { chooseTheme, THEMES, useTheme } from '../../lib/theme.ts';
import { Button } from '../../ui/button.tsx';
import { Field, Select, Tick } from '../../ui/field.tsx';
import { meQuery, signOut } from '../session.ts';

/** Behind the initials: who is signed in, other centres, settings, theme, sign out. The browser's own popover, closed by Escape. */
export function AccountMenu({ me }: { me: Identity }) {
  const id = useId();
  const initials = me.name.split(/\s+/).map((part) => part.charAt(0)).join('').slice(0, 2).toUpperCase();
  return (
    <>
      <button type="button" popoverTarget={id} aria-label={`${wording.account}: ${me.name}`} className="type-number grid size-9 place-items-center rounded-full bg-cap text-[0.9375rem] text-pin max-[900px]:size-11">
        {initials}
      </button>
      <div id={id} popover="auto" className="fixed inset-auto top-14 right-4 m-0 w-[min(20rem,calc(100vw-2rem))] border border-line bg-card p-5 text-ink">
        <MenuContent me={me} />
      </div>
    </>
  );
}

function MenuContent({ me }: { me: Identity }) {
  const { slug, role, may } = useCentre();
  const theme = useTheme();
  const keys = useLetterKeys();
  const leave = useLeave();
  const others = me.centres.filter((c) => c.slug !== slug);
  return (
    <div className="flex flex-col gap-4">
      <div>
        <p className="type-name">{me.name}</p>
        <p className="type-label">{[roleText[role], me.email].filter(Boolean).join(' · ')}</p>
      </div>
      {others.length > 0 ? (
        <nav aria-label={wording.otherCentres}>
          <p className="type-label">{wording.otherCentres}</p>
          {others.map((c) => (
            <Link key={c.slug} to={`/${c.slug}`} className="block py-1 font-[620] underline underline-offset-4">
              {c.name}
            </Link>
          ))}
        </nav>
      ) : null}
      {may('settings.see') ? <Link to={`/${slug}/settings`} className="font-[620] underline underline-offset-4">{wording.settings}</Link> : null}
      <Link to={`/${slug}/account`} className="font-[620] underline underline-offset-4">{wording.ownAccount}</Link>
      <Field label={wording.theme}>
        {(c) => <Select {...c} value={theme} options={THEMES.map((t) => [t, wording.themes[t]])} onChange={(event) => chooseTheme(THEMES.find((t) => t === event.target.value) ?? 'system')} />}
      </Field>
      <Tick label={wording.letterKeys} checked={keys} onChange={(event) => setLetterKeys(event.target.checked)} />
      <Button onClick={() => void leave()}>{wording.signOut}</Button>
    </div>
  );
}

function useLeave(): () => Promise<void> {
  const queries = useQueryClient();
  const navigate = useNavigate();
  return async () => {
    await signOut();
    queries.clear();
    queries.setQueryData(meQuery.queryKey, null);
    await navigate('/sign-in');
  };
}
