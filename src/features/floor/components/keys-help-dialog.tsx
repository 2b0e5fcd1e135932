import { keysHelp } from '#shared/text/en/floor-page.ts';
import { setLetterKeys, useLetterKeys } from '../../../lib/keyboard.ts';
import { Dialog } from '../../../ui/dialog.tsx';
import { Tick } from '../../../ui/field.tsx';
import { Legend } from './floor-key.tsx';

export function KeysHelpDialog({ onClose }: { onClose: () => void }) {
  const on = useLetterKeys();
  return (
    <Dialog open onClose={onClose} title={keysHelp.title} lead={keysHelp.lead}>
      <dl className="grid grid-cols-[6rem_1fr] gap-x-4">
        {keysHelp.rows.map(([key, what]) => (
          <div key={key} className="contents">
            <dt className="border-t border-rule py-2 font-[700]">{key}</dt>
            <dd className="border-t border-rule py-2">{what}</dd>
          </div>
        ))}
      </dl>
      <Tick label={keysHelp.letters} checked={on} onChange={(event) => setLetterKeys(event.target.checked)} />
      <div className="[&_ul]:h-auto">
        <Legend />
      </div>
    </Dialog>
  );
}
