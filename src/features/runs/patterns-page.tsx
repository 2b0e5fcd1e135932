import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { feet, millilitres } from '#shared/text/en/formats.ts';
import { patternsText as text } from '#shared/text/en/runs-page.ts';
import { useCentre } from '../../lib/centre.ts';
import { sentenceOf } from '../../lib/refusal.ts';
import { Button } from '../../ui/button.tsx';
import { Sheet } from '../../ui/dialog.tsx';
import { EmptyState, Page, Skeleton } from '../../ui/page.tsx';
import { Table, Td, Th } from '../../ui/table.tsx';
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
        <Table caption={text.title(data.patterns.length)}>
          <thead><tr><Th>{text.name}</Th><Th number>{text.length}</Th><Th number>{text.volume}</Th><Th number>{text.revision}</Th><Th>{text.usedBy}</Th></tr></thead>
          <tbody>
            {data.patterns.map((p) => (
              <tr key={p.code}>
                <Td><Link className="type-name underline decoration-rule underline-offset-4" to={`/${slug}/patterns/${p.code}`}>{p.name}</Link></Td>
                <Td number>{feet(p.lengthFt)}</Td><Td number>{millilitres(p.volume.totalUl)}</Td><Td number>{p.revision}</Td>
                <Td className="text-dim">{p.usedBy.length === 0 ? text.nobody : p.usedBy.join(', ')}</Td>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
      <Sheet open={adding} onClose={() => setAdding(false)} title={text.add}>
        <PatternForm code={null} start={null} onSaved={(code) => void navigate(`/${slug}/patterns/${code}`)} />
      </Sheet>
    </Page>
  );
}
