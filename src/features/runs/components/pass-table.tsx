import type { PatternDetail } from '#shared/contracts/runs.ts';
import { formatBoard } from '#shared/domain/runs/pattern.ts';
import { number } from '#shared/text/en/formats.ts';
import { patternsText as text } from '#shared/text/en/runs-page.ts';
import { Table, Td, Th } from '../../../ui/table.tsx';

/** Passes in their order with what each lays; which product only where there is more than one. */
export function PassTable({ revision }: { revision: PatternDetail['revisions'][number] }) {
  const { passes } = revision.body;
  const products = new Set(passes.map((pass) => pass.product)).size > 1;
  const ft = (value: number): string => number(value, value % 1 === 0 ? 0 : 1);
  const ml = (ul: number): string => number(ul / 1000, 2);
  return (
    <Table caption={text.passes}>
      <thead><tr><Th>{text.way}</Th><Th>{text.boards}</Th><Th number>{text.loadsUl}</Th>{products ? <Th>{text.product}</Th> : null}<Th>{text.feet}</Th><Th number className="pr-0">{text.ml}</Th></tr></thead>
      <tbody>
        {passes.map((pass, i) => (
          <tr key={i}>
            <Td>{pass.direction === 'outbound' ? text.outbound : text.back}</Td>
            <Td className="type-number whitespace-nowrap">{`${formatBoard(pass.fromBoard)}–${formatBoard(pass.toBoard)}`}</Td>
            <Td number>{pass.loads === 0 ? text.buffOnly : `${pass.loads} × ${number(pass.ul)}`}</Td>
            {products ? <Td>{pass.product}</Td> : null}
            <Td className="whitespace-nowrap">{`${ft(pass.fromFt)}–${ft(pass.toFt)}`}</Td>
            <Td number className="pr-0">{pass.loads === 0 ? '–' : ml(revision.passUl[i] ?? 0)}</Td>
          </tr>
        ))}
        <tr><Td className="font-[650]" colSpan={products ? 5 : 4}>{text.total}</Td><Td number className="pr-0">{ml(revision.volume.totalUl)}</Td></tr>
      </tbody>
    </Table>
  );
}
