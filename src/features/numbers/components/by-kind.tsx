import type { NightView } from '#shared/contracts/numbers.ts';
import { duration, number } from '#shared/text/en/formats.ts';
import { intervalText, KIND_NAMES, rateText, wording } from '#shared/text/en/numbers.ts';
import { PartTitle } from '../../../ui/page.tsx';
import { Table, Td, Th } from '../../../ui/table.tsx';

type Figures = NightView['figures'];

export function ByKind({ kinds }: { kinds: Figures['byKind'] }) {
  return (
    <section className="mt-8">
      <PartTitle>{wording.byKind}</PartTitle>
      <Table caption={wording.byKind}>
        <thead>
          <tr>
            <Th>{wording.kind}</Th><Th number>{wording.played}</Th><Th number>{wording.deliveries}</Th><Th number>{wording.frames}</Th>
            <Th number>{wording.stops}</Th><Th number>{wording.rate}</Th><Th number>{wording.interval}</Th>
          </tr>
        </thead>
        <tbody>
          {kinds.map((k) => (
            <tr key={k.kind}>
              <Td>{KIND_NAMES[k.kind]}</Td><Td number>{duration(k.playedMs)}</Td><Td number>{number(k.deliveries)}</Td><Td number>{number(k.frames)}</Td>
              <Td number>{number(k.stops)}</Td><Td number>{rateText(k.rate)}</Td><Td number className="font-[450] text-dim">{intervalText(k.rate)}</Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </section>
  );
}
