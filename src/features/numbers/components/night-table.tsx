import type { NightView } from '#shared/contracts/numbers.ts';
import { nightRows, wording } from '#shared/text/en/numbers.ts';
import { Table, Td, Th } from '../../../ui/table.tsx';

/** The night beside the same weekday's last eight: median, and from least to greatest. */
export function NightTable({ night }: { night: NightView }) {
  const n = Math.max(0, ...Object.values(night.past).map((p) => p.n));
  return (
    <Table caption={wording.nightOf(night.date)}>
      <thead>
        <tr>
          <Th><span className="sr-only">{wording.nightOf(night.date)}</span></Th>
          <Th>{wording.thisNight}</Th>
          <Th>{wording.past(n, night.date)}</Th>
        </tr>
      </thead>
      <tbody>
        {nightRows(night.figures).map((row) => {
          const past = night.past[row.figure];
          return (
            <tr key={row.figure}>
              <th scope="row" className="border-t border-rule py-2.5 pr-4 text-left align-baseline font-[450] text-dim">{row.name}</th>
              <Td>
                <span className="type-number">{row.value}</span>
                {row.note ? <small className="block text-dim">{row.note}</small> : null}
              </Td>
              <Td>
                {past.median === null ? '–' : row.past(past.median)}
                {past.low !== null && past.high !== null && past.n > 1 ? <small className="block text-dim">{`${row.past(past.low)} – ${row.past(past.high)}`}</small> : null}
              </Td>
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
