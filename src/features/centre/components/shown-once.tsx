import { settingsWords } from '#shared/text/en/centre-page.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { showToast } from '../../../ui/toast.tsx';

/** A secret that is stored as a hash only: shown once, to be copied now. The clipboard needs https; without it one selects the text. */
export function ShownOnce({ what, secret, onDone }: { what: string; secret: string | null; onDone: () => void }) {
  const copy = async () => {
    await navigator.clipboard.writeText(secret ?? '');
    showToast(settingsWords.copied);
  };
  return (
    <Dialog
      open={secret !== null}
      onClose={onDone}
      title={settingsWords.onceTitle}
      lead={what}
      actions={
        <>
          {'clipboard' in navigator ? <Button onClick={() => void copy()}>{settingsWords.copy}</Button> : null}
          <Button kind="primary" onClick={onDone}>{settingsWords.done}</Button>
        </>
      }
    >
      <code className="block rounded-md border border-line bg-card p-3 text-base break-all select-all">{secret}</code>
    </Dialog>
  );
}
