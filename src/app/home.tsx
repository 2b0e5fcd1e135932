import { useQuery } from '@tanstack/react-query';
import { Link, Navigate } from 'react-router-dom';
import { roleText } from '#shared/text/en/accounts.ts';
import { appText, wording } from '#shared/text/en/app.ts';
import { EmptyState, Page, Skeleton } from '../ui/page.tsx';
import { homeOf } from './navigation.ts';
import { meQuery } from './session.ts';

/** `/`: on to one's own centre; who has several chooses. */
export function Home() {
  const me = useQuery(meQuery);
  if (me.data === undefined) return <div className="p-8"><Skeleton label={wording.loading} /></div>;
  if (me.data === null) return <Navigate to="/sign-in" replace />;
  const only = me.data.centres.length === 1 ? me.data.centres[0] : undefined;
  if (only) return <Navigate to={`/${only.slug}/${homeOf(only.role)}`} replace />;
  if (me.data.centres.length === 0) return <Page title={appText.noCentre}><EmptyState title={appText.noCentreMore} /></Page>;
  return (
    <Page title={appText.chooseCentre}>
      <ul>
        {me.data.centres.map((centre) => (
          <li key={centre.slug} className="border-t border-rule">
            <Link to={`/${centre.slug}/${homeOf(centre.role)}`} className="type-name flex min-h-hand items-center text-lg">
              {appText.centreAndRole(centre.name, roleText[centre.role])}
            </Link>
          </li>
        ))}
      </ul>
    </Page>
  );
}
