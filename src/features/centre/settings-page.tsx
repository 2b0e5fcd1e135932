import { useQuery } from '@tanstack/react-query';
import { settingsWords } from '#shared/text/en/centre-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { EmptyState, Page, Skeleton } from '../../ui/page.tsx';
import { CentreForm } from './components/centre-form.tsx';
import { Displays } from './components/displays.tsx';
import { Gateways } from './components/gateways.tsx';
import { LanesTable } from './components/lanes-table.tsx';
import { People } from './components/people.tsx';
import { RulesForm } from './components/rules-form.tsx';
import { SetAside } from './components/set-aside.tsx';
import { settingsQuery } from './queries.ts';

/** The centre as it is set: name and hours, lanes, gateways and their keys, events set aside, people, screens. */
export function SettingsPage() {
  const { slug, name, may } = useCentre();
  const settings = useQuery(settingsQuery(slug));
  const edits = may('settings.edit');
  return (
    <Page title={settingsWords.title(name)} lead={edits ? null : settingsWords.lead}>
      {settings.error && !settings.data ? <EmptyState title={settingsWords.failed}>{sentenceOf(settings.error)}</EmptyState> : null}
      {settings.isPending ? <Skeleton lines={10} label={settingsWords.loading} /> : null}
      {settings.data ? (
        <div className="grid items-start gap-x-14 gap-y-10 min-[1200px]:grid-cols-2">
          <div className="flex min-w-0 flex-col gap-10">
            <CentreForm key={JSON.stringify(settings.data.centre)} settings={settings.data.centre} edits={edits} />
            <RulesForm key={JSON.stringify(settings.data.rules)} rules={settings.data.rules} edits={edits} />
            <Gateways gateways={settings.data.gateways} edits={edits} />
            <SetAside edits={edits} />
            {may('people.manage') ? <Displays /> : null}
          </div>
          <div className="flex min-w-0 flex-col gap-10">
            {may('people.manage') ? <People /> : null}
            <LanesTable lanes={settings.data.lanes} edits={edits} />
          </div>
        </div>
      ) : null}
    </Page>
  );
}
