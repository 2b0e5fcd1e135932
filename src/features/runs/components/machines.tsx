import type { ResponseOf } from '#shared/contracts/contract.ts';
import type { runContracts } from '#shared/contracts/runs.ts';
import { number, percent } from '#shared/text/en/formats.ts';
import { runsText as text } from '#shared/text/en/runs-page.ts';
import { PartTitle } from '../../../ui/page.tsx';

type Machine = ResponseOf<typeof runContracts.machines>['machines'][number];

const levels = (m: Machine): string => {
  const ml = (name: string, value: number | null) => (value === null ? null : `${name} ${number(value)} mL`);
  const told = [ml('A', m.tankAMl), ml('B', m.tankBMl), ml('cleaner', m.cleanerMl), ml('waste', m.wasteMl), m.batteryPct === null ? null : `battery ${percent(m.batteryPct)}`].filter(Boolean);
  return told.length === 0 ? text.levelsNone : told.join(' · ');
};

export function Machines({ machines }: { machines: readonly Machine[] }) {
  return (
    <section>
      <PartTitle>{text.machines}</PartTitle>
      <ul>
        {machines.map((m) => (
          <li key={m.code} className="border-t border-rule py-2.5">
            <strong className="font-[650]">{m.name}</strong>
            <p className="text-dim">{m.paceMs === null ? levels(m) : `${levels(m)} · ${text.pace(m.paceMs)}`}</p>
          </li>
        ))}
      </ul>
      <p className="mt-4 border-l-4 border-amber-fill pl-3 text-sm">{text.caution}</p>
    </section>
  );
}
