import type { NightView } from '#shared/contracts/numbers.ts';
import { wording } from '#shared/text/en/numbers.ts';

/** What came out otherwise since the report was issued: the house open, lanes and kinds of play folded beneath it. */
export function Differs({ differs }: Pick<NightView, 'differs'>) {
  if (differs.length === 0) return null;
  const places = Map.groupBy(differs, wording.differWhere);
  return (
    <div className="mt-2">
      <p className="font-[620]">{wording.differ(differs.length)}</p>
      {[...places].map(([place, rows]) => (
        <details key={place} open={rows[0]?.lane === null && rows[0].kind === null}>
          <summary className="min-h-9 cursor-pointer content-center">{place} <span className="text-dim">{wording.differCount(rows.length)}</span></summary>
          <ul className="list-disc pb-2 pl-5 text-dim">
            {rows.map((row) => <li key={row.figure}>{wording.differRow(row)}</li>)}
          </ul>
        </details>
      ))}
    </div>
  );
}
