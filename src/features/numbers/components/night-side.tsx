import { Link } from 'react-router-dom';
import type { NightView } from '#shared/contracts/numbers.ts';
import { addDays } from '#shared/domain/business-day.ts';
import { wording } from '#shared/text/en/numbers.ts';
import { useCentre } from '../../../lib/centre.ts';
import { useTimes } from '../../../lib/formats.ts';
import { buttonLook } from '../../../ui/button.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { Differs } from './differs.tsx';
import { NightTable } from './night-table.tsx';

/** The night at the manager's elbow: its figures beside the weekday's past, and whether the issued report still holds. */
export function NightSide({ night }: { night: NightView }) {
  const { slug } = useCentre();
  const { time, dayAndTime } = useTimes();
  const to = (date: string) => `/${slug}/numbers/${date}`;
  return (
    <>
      <PartTitle note={night.running ? `${wording.running}, ${wording.asOf(time(night.at))}` : undefined}>{wording.nightOf(night.date)}</PartTitle>
      <NightTable night={night} />
      <nav aria-label={wording.choose} className="mt-4 flex flex-wrap gap-3 print:hidden">
        <Link className={buttonLook({ kind: 'secondary' })} to={to(addDays(night.date, -1))}>{wording.earlier}</Link>
        {night.running ? null : <Link className={buttonLook({ kind: 'secondary' })} to={to(addDays(night.date, 1))}>{wording.later}</Link>}
      </nav>
      <p className="mt-5 text-dim">{night.report ? wording.issued(dayAndTime(night.report.issuedAt)) : wording.notIssued}</p>
      {night.report && night.differs.length === 0 ? <p className="text-dim">{wording.sameAsIssued}</p> : null}
      <Differs differs={night.differs} />
      <details className="mt-5 text-dim">
        <summary className="min-h-9 cursor-pointer font-[620] text-ink">{wording.definitions}</summary>
        {wording.definition.map((line) => <p key={line} className="mt-2">{line}</p>)}
      </details>
    </>
  );
}
