import { type BodyOf } from '#shared/contracts/contract.ts';
import { centreContracts, LANE_FAMILIES, type LaneSettings, STOP_COVERAGES } from '#shared/contracts/centre.ts';
import { settingsText } from '#shared/text/en/centre.ts';
import { settingsWords } from '#shared/text/en/centre-page.ts';
import { call } from '../../../lib/api.ts';
import { useCentre } from '../../../lib/centre.ts';
import { sentenceOf } from '../../../lib/refusal.ts';
import { Refused } from '../../../ui/banner.tsx';
import { Input, Select } from '../../../ui/field.tsx';
import { LaneBadge } from '../../../ui/marks.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { Table, Td, Th } from '../../../ui/table.tsx';
import { useChange } from '../mutations.ts';

/** What is known of each lane; a change is saved as it is made. */
export function LanesTable({ lanes, edits }: { lanes: readonly LaneSettings[]; edits: boolean }) {
  return (
    <section>
      <PartTitle>{settingsWords.lanes}</PartTitle>
      <p className="type-label mb-2">{settingsWords.lanesLead}</p>
      <Table caption={settingsWords.lanes}>
        <thead>
          <tr>
            <Th>{settingsWords.lane}</Th>
            <Th>{settingsWords.family}</Th>
            <Th>{settingsWords.coverage}</Th>
            <Th>{settingsWords.certified}</Th>
          </tr>
        </thead>
        <tbody>
          {lanes.map((lane) => (
            <Lane key={lane.lane} lane={lane} edits={edits} />
          ))}
        </tbody>
      </Table>
    </section>
  );
}

function Lane({ lane, edits }: { lane: LaneSettings; edits: boolean }) {
  const { slug } = useCentre();
  const save = useChange(slug, (body: BodyOf<typeof centreContracts.lane>) => call(centreContracts.lane, { params: { centre: slug, lane: lane.lane }, body }));
  const disabled = !edits || save.isPending;
  return (
    <tr>
      <Td><LaneBadge lane={lane.lane} size={18} /></Td>
      <Td>
        <Select className="min-w-max" aria-label={settingsWords.familyOf(lane.lane)} disabled={disabled} value={lane.family} options={LANE_FAMILIES.map((f) => [f, settingsText.family[f]])} onChange={(event) => save.mutate({ family: LANE_FAMILIES.find((f) => f === event.target.value) })} />
        <Refused>{sentenceOf(save.error)}</Refused>
      </Td>
      <Td>
        <Select className="min-w-max" aria-label={settingsWords.coverageOf(lane.lane)} disabled={disabled} value={lane.stopCoverage} options={STOP_COVERAGES.map((c) => [c, settingsText.stopCoverage[c]])} onChange={(event) => save.mutate({ stopCoverage: STOP_COVERAGES.find((c) => c === event.target.value) })} />
      </Td>
      <Td>
        <Input key={lane.certifiedUntil ?? ''} type="date" aria-label={settingsWords.certifiedOf(lane.lane)} disabled={disabled} defaultValue={lane.certifiedUntil ?? ''} onBlur={(event) => {
          const next = event.target.value === '' ? null : event.target.value;
          if (next !== lane.certifiedUntil) save.mutate({ certifiedUntil: next });
        }} />
      </Td>
    </tr>
  );
}
