import { useId } from 'react';
import { NavLink } from 'react-router-dom';
import { wording } from '#shared/text/en/app.ts';
import { useCentre } from '../../lib/centre.ts';
import { classes } from '../../ui/class-names.ts';
import { pagesOf } from '../navigation.ts';
import { OpenCalls } from './header.tsx';

const AT_THE_THUMB = 4;
const tab = 'flex min-h-14 grow basis-0 items-center justify-center gap-1 px-1 font-[620] [font-stretch:90%]';

/** Pages at the thumb on a phone; what doesn't fit stands behind "More". */
export function TabBar() {
  const { slug, role } = useCentre();
  const id = useId();
  const pages = pagesOf(role);
  const first = pages.length <= AT_THE_THUMB + 1 ? pages : pages.slice(0, AT_THE_THUMB);
  const rest = pages.slice(first.length);
  return (
    <nav aria-label={wording.mainNavigation} className="fixed inset-x-0 bottom-0 z-20 flex border-t border-rule bg-card pb-[env(safe-area-inset-bottom)] min-[900px]:hidden">
      {first.map((page) => (
        <NavLink key={page} to={`/${slug}/${page}`} className={({ isActive }) => classes(tab, isActive ? 'text-ink shadow-[inset_0_3px_0_var(--ink)]' : 'text-dim')}>
          {wording.navShort[page]}
          {page === 'calls' ? <OpenCalls /> : null}
        </NavLink>
      ))}
      {rest.length > 0 ? (
        <>
          <button type="button" popoverTarget={id} className={classes(tab, 'text-dim')}>
            {wording.more}
          </button>
          <div id={id} popover="auto" className="fixed inset-auto right-2 bottom-16 m-0 min-w-48 border border-line bg-card py-1 text-ink">
            {rest.map((page) => (
              <NavLink key={page} to={`/${slug}/${page}`} className="flex min-h-hand items-center px-5 font-[620]">
                {wording.nav[page]}
              </NavLink>
            ))}
          </div>
        </>
      ) : null}
    </nav>
  );
}
