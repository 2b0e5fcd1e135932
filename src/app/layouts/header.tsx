import { NavLink } from 'react-router-dom';
import type { Identity } from '#shared/contracts/accounts.ts';
import { appText, wording } from '#shared/text/en/app.ts';
import { dayOfDate } from '#shared/text/en/formats.ts';
import { useBoard } from '../../features/floor/index.ts';
import { useCentre } from '../../lib/centre.ts';
import { useNow } from '../../lib/clock.ts';
import { useTimes } from '../../lib/formats.ts';
import { classes } from '../../ui/class-names.ts';
import { homeOf, pagesOf } from '../navigation.ts';
import { AccountMenu } from './account-menu.tsx';
import { LiveMark } from './live-mark.tsx';
import { MarkGlyph } from './mark-glyph.tsx';

/** Mark, pages of this role, where and when one is, and how live. On a phone: where and when; the pages are at the thumb. */
export function Header({ me }: { me: Identity }) {
  const { slug, name, role } = useCentre();
  return (
    <header className="flex h-14 shrink-0 items-center gap-5 border-b border-rule px-6 max-[900px]:h-12 max-[900px]:gap-3 max-[900px]:border-b-0 max-[900px]:px-4">
      <NavLink to={`/${slug}/${homeOf(role)}`} className="flex items-center gap-2.5 text-[1.0625rem] font-[800] [font-stretch:118%] max-[900px]:hidden">
        <MarkGlyph />
        {wording.product}
      </NavLink>
      <nav aria-label={wording.mainNavigation} className="flex gap-1 max-[900px]:hidden">
        {pagesOf(role).map((page) => (
          <NavLink
            key={page}
            to={`/${slug}/${page}`}
            className={({ isActive }) =>
              classes('rounded-md px-3 py-1.5 font-[570] whitespace-nowrap [font-stretch:96%] max-[1180px]:px-2', isActive ? 'bg-card text-ink shadow-[inset_0_-2px_0_var(--ink)]' : 'text-dim hover:text-ink')
            }
          >
            {wording.nav[page]}
            {page === 'calls' ? <OpenCalls /> : null}
          </NavLink>
        ))}
      </nav>
      <div className="ml-auto flex items-baseline gap-4 max-[900px]:mr-auto max-[900px]:ml-0 max-[900px]:gap-2.5">
        <span className="whitespace-nowrap text-dim max-[1240px]:hidden max-[900px]:block max-[900px]:font-[700] max-[900px]:text-ink">{name}</span>
        <BusinessDate />
      </div>
      <div className="flex items-center gap-4 max-[900px]:gap-3">
        <Clock />
        <LiveMark />
        <AccountMenu me={me} />
      </div>
    </header>
  );
}

/** Open calls that nobody answered, else all that are open. */
export function OpenCalls() {
  const calls = useBoard('calls') ?? [];
  const unanswered = calls.some((c) => c.status === 'unanswered' && c.returnedAt === null);
  if (calls.length === 0) return null;
  return (
    <span className={classes('ml-1.5 inline-block min-w-5 rounded-full px-1.5 text-center text-xs leading-5 font-[720]', unanswered ? 'bg-red text-on-red' : 'bg-ink text-paper')}>
      {calls.length}
      <span className="sr-only"> {appText.openCalls(calls.length)}</span>
    </span>
  );
}

function BusinessDate() {
  const business = useBoard('business');
  return <b className="font-[640] whitespace-nowrap max-[900px]:font-[480] max-[900px]:text-dim">{business ? dayOfDate(business.date) : null}</b>;
}

function Clock() {
  const { time } = useTimes();
  return <time className="type-clock text-[1.375rem]">{time(useNow())}</time>;
}
