import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import type { PatternDetail } from '#shared/contracts/runs.ts';
import { feet, millilitres } from '#shared/text/en/formats.ts';
import { fieldSentence } from '#shared/text/en/refusals.ts';
import { insteadText, patternsText as text, ratioText, reasonsText } from '#shared/text/en/runs-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { useTimes } from '../../lib/formats.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { Sheet } from '../../ui/dialog.tsx';
import { Page, PartTitle, Skeleton } from '../../ui/page.tsx';
import { Fact, Facts } from '../../ui/table.tsx';
import { BoardBars, DifferenceBars, FilmFromAbove } from './components/film-picture.tsx';
import { PassTable } from './components/pass-table.tsx';
import { PatternForm } from './components/pattern-form.tsx';
import { patternQuery } from './queries.ts';

type Revision = PatternDetail['revisions'][number];

/** One pattern: its film drawn, what it lays, who can lay it, and every revision it has had. */
export function PatternPage() {
  const { slug, may } = useCentre();
  const code = useParams()['code'] ?? '';
  const { data, error } = useQuery(patternQuery(slug, code));
  const [chosen, setChosen] = useState<number | null>(null);
  const [revising, setRevising] = useState(false);
  const revision = data?.revisions.find((r) => r.revision === chosen) ?? data?.revisions[0];
  if (!data || !revision) return <Page title={error ? text.failed : text.loading} lead={sentenceOf(error)}><Skeleton lines={8} label={text.loading} /></Page>;
  return (
    <Page
      title={data.name}
      lead={`${feet(revision.body.lengthFt)} · ${millilitres(revision.volume.totalUl)} · ${text.revision} ${revision.revision} · ${text.estimate}`}
      actions={may('pattern.edit') ? <Button kind="primary" onClick={() => setRevising(true)}>{text.revise}</Button> : null}
      aside={<Side pattern={data} revision={revision} onChoose={setChosen} />}
    >
      <p className="mb-4"><Link className="underline decoration-rule underline-offset-4" to={`/${slug}/patterns`}>{text.all}</Link></p>
      <div className="grid gap-8 min-[901px]:grid-cols-[auto_minmax(0,1fr)]">
        <figure className="m-0">
          <figcaption><PartTitle>{text.fromAbove}</PartTitle></figcaption>
          <FilmFromAbove revision={revision.body} />
        </figure>
        <div className="min-w-0">
          <PartTitle>{text.across}</PartTitle>
          <BoardBars revision={revision.body} ratio={revision.ratio} />
          <PartTitle className="mt-6">{text.passes}</PartTitle>
          <PassTable revision={revision} />
        </div>
      </div>
      <Sheet open={revising} onClose={() => setRevising(false)} title={text.revise}>
        <PatternForm code={data.code} start={revision.body} onSaved={() => { setRevising(false); setChosen(null); }} />
      </Sheet>
    </Page>
  );
}

function Side({ pattern, revision, onChoose }: { pattern: PatternDetail; revision: Revision; onChoose: (revision: number) => void }) {
  const { dayAndTime } = useTimes();
  const exit = revision.exitBoard === null ? null : <Fact term={text.exit}>{revision.exitBoard}</Fact>;
  return (
    <>
      <Facts>
        {([['A', revision.volume.aUl], ['B', revision.volume.bUl]] as const).filter(([, ul]) => ul > 0).map(([product, ul]) => <Fact key={product} term={`${text.conditioner} ${product}`}>{millilitres(ul)}</Fact>)}
        {revision.volume.bUl === 0 ? exit : null}
        <Fact term={`${text.ratio}, ${text.left}`}>{ratioText(revision.ratio.left)}</Fact>
        <Fact term={`${text.ratio}, ${text.right}`}>{ratioText(revision.ratio.right)}</Fact>
        {revision.volume.bUl > 0 ? exit : null}
      </Facts>
      <p className="mt-1 text-sm text-dim">{text.ratioNote}</p>
      {revision.exitBoard === null ? null : <p className="text-sm text-dim">{text.exitNote}</p>}
      <PartTitle className="mt-6">{text.machines}</PartTitle>
      <ul>
        {revision.machines.map((m) => (
          <li key={m.machine} className="border-t border-rule py-2">
            <strong className="font-[650]">{m.name}</strong>
            <p className="text-dim">{m.canLay ? text.can : reasonsText(m.reasons.map((r) => ({ pass: r.pass, says: fieldSentence(r.code, r.params) })))}</p>
            {m.instead ? <Instead instead={m.instead} asked={revision.volume.totalUl} /> : null}
          </li>
        ))}
      </ul>
      <PartTitle className="mt-6">{text.revisions}</PartTitle>
      <ul>
        {pattern.revisions.map((r) => (
          <li key={r.revision} className="border-t border-rule">
            <button type="button" aria-pressed={r.revision === revision.revision} onClick={() => onChoose(r.revision)} className="min-h-hand w-full py-2 text-left hover:underline aria-pressed:font-[700]">
              {`${r.revision} · ${dayAndTime(r.at)} ${text.by} ${r.by} · ${millilitres(r.volume.totalUl)}${r.note ? ` · ${r.note}` : ''}`}
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}

/** What a machine with one volume would lay instead, and where it differs. */
function Instead({ instead, asked }: { instead: NonNullable<Revision['machines'][number]['instead']>; asked: number }) {
  return (
    <figure className="m-0 mt-2">
      <figcaption>{insteadText(instead, asked)}</figcaption>
      <DifferenceBars differenceUl={instead.differenceUl} className="mt-1.5 w-full max-w-80" />
    </figure>
  );
}
