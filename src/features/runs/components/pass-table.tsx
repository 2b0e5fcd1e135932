import type { PatternDetail } from '#shared/contracts/runs.ts';
import { formatBoard } from '#shared/domain/runs/pattern.ts';
import { millilitres, number } from '#shared/text/en/formats.ts';
import { patternsText as text } from '#shared/text/en/runs-page.ts';
import { Table, Td, Th } from '../../../ui/table.tsx';

/** Passes in their order with what each lays. */
export function PassTable({ revision }: { revision: PatternDetail['revisions'][number] }) {
  return (
    <Table caption={text.passes}>
      <thead><tr><Th>{text.way}</Th><Th>{text.boards}</Th><Th number>{text.loads}</Th><Th number>{text.ul}</Th><Th>{text.product}</Th><Th>{text.feet}</Th><Th number>{text.volume}</Th></tr></thead>
      <tbody>
        {revision.body.passes.map((pass, i) => (
          <tr key={i}>
            <Td>{pass.direction === 'outbound' ? text.outbound : text.back}</Td>
            <Td className="type-number">{`${formatBoard(pass.fromBoard)}–${formatBoard(pass.toBoard)}`}</Td>
            <Td number>{pass.loads}</Td><Td number>{pass.ul}</Td><Td>{pass.product}</Td>
            <Td>{`${number(pass.fromFt, pass.fromFt % 1 === 0 ? 0 : 1)}–${number(pass.toFt, pass.toFt % 1 === 0 ? 0 : 1)}`}</Td>
            <Td number>{millilitres(revision.passUl[i] ?? 0)}</Td>
          </tr>
        ))}
        <tr><Td className="font-[650]" colSpan={6}>{text.total}</Td><Td number>{millilitres(revision.volume.totalUl)}</Td></tr>
      </tbody>
    </Table>
  );
}
