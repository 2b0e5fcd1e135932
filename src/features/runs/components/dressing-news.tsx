import type { TonightView } from '#shared/contracts/runs.ts';
import { lanesText } from '#shared/text/en/formats.ts';
import { planReason, planText, runsOutText } from '#shared/text/en/plan.ts';
import { useTimes } from '../../../lib/formats.ts';

type Because = Parameters<typeof planReason>[0][];

/** What the night's dressing can't do: sessions that will be late and why, lanes that nothing here can dress, tanks that don't last. */
export function DressingNews({ late, unplanned, runsOut, machine }: Pick<TonightView, 'late' | 'unplanned' | 'runsOut'> & { machine: (code: string) => string }) {
  const { time } = useTimes();
  const news = [
    ...late.map((one) => ({ key: one.session, title: `${planText.lateBy(one.session, one.byMs)}.`, because: one.because })),
    ...unplanned.map((one) => ({ key: `${one.session}/${one.lanes[0] ?? 0}`, title: `${planText.unplanned(`${one.session}, ${lanesText(one.lanes)}`)}.`, because: one.because })),
    ...runsOut.map((one) => ({ key: `${one.machine}/${one.store}`, title: runsOutText(machine(one.machine), one), because: [] })),
  ];
  return (
    <ul className="mb-6 flex flex-col gap-3 empty:hidden">
      {news.map(({ key, title, because }) => (
        <li key={key} className="border-l-4 border-red pl-3">
          <strong className="font-[700]">{title}</strong>
          <p className="max-w-[68ch] text-dim empty:hidden">{because.map((one) => planReason(one as Because[number], time)).join(' ')}</p>
        </li>
      ))}
    </ul>
  );
}
