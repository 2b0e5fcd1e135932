import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { feet } from '#shared/text/en/formats.ts';
import { patternsText as text } from '#shared/text/en/runs-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { Sheet } from '../../ui/dialog.tsx';
import { EmptyState, Page, Skeleton } from '../../ui/page.tsx';
import { FilmProfile } from './components/film-picture.tsx';
import { PatternForm } from './components/pattern-form.tsx';
import { patternsQuery } from './queries.ts';

/** Patterns of the house with what they lay and who wants them. */
export function PatternsPage() {
  const { slug, may } = useCentre();
  const navigate = useNavigate();
  const { data, error } = useQuery(patternsQuery(slug));
  const [adding, setAdding] = useState(false);
  if (!data) return <Page title={error ? text.failed : text.loading} lead={sentenceOf(error)}><Skeleton lines={5} label={text.loading} /></Page>;
  return (
    <Page title={text.title(data.patterns.length)} actions={may('pattern.edit') ? <Button kind="primary" onClick={() => setAdding(true)}>{text.add}</Button> : null}>
      {data.patterns.length === 0 ? <EmptyState title={text.none}>{text.noneMore}</EmptyState> : (
        <ul className="border-b border-rule">
          {data.patterns.map((p) => (
            <li key={p.code} className="border-t border-rule">
              <Link className="grid grid-cols-[8.5rem_minmax(0,1fr)] items-center gap-x-6 gap-y-1 py-3 hover:bg-card min-[901px]:grid-cols-[10rem_14rem_minmax(0,1fr)]" to={`/${slug}/patterns/${p.code}`}>
                <FilmProfile boardsNl={p.boardsNl} className="w-full" />
                <span>
                  <strong className="type-name block text-[1.0625rem]">{p.name}</strong>
                  <span className="text-dim">{`${feet(p.lengthFt)} · ${text.aLane(p.volume.totalUl)} · ${text.revision.toLowerCase()} ${p.revision}`}</span>
                </span>
                <span className="text-dim max-[900px]:col-span-2">{text.wantedBy(p.usedBy)}</span>
              </Link>
            </li>
          ))}
        </ul>
      )}
      <Sheet open={adding} onClose={() => setAdding(false)} title={text.add}>
        <PatternForm code={null} start={null} onSaved={(code) => void navigate(`/${slug}/patterns/${code}`)} />
      </Sheet>
    </Page>
  );
}
