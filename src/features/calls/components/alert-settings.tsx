import { useState, useSyncExternalStore } from 'react';
import { alertText } from '#shared/text/en/calls-screen.ts';
import { Button } from '../../../ui/button.tsx';
import { PartTitle } from '../../../ui/page.tsx';
import { onSound, setSound, soundOn, soundPossible } from '../sound.ts';

type Notices = 'on' | 'ask' | 'denied' | 'plain' | 'none';

function noticesNow(): Notices {
  if (!window.isSecureContext) return 'plain';
  if (!('Notification' in window)) return 'none';
  return Notification.permission === 'granted' ? 'on' : Notification.permission === 'denied' ? 'denied' : 'ask';
}

const SAYS: Record<Notices, string | null> = {
  on: alertText.noticesOn, ask: null, denied: alertText.noticesDenied, plain: alertText.noticesPlain, none: alertText.noticesNone,
};

/** Asks for sound and notices when pressed, never by itself, and says what this phone or address can't do. */
export function AlertSettings() {
  const on = useSyncExternalStore(onSound, soundOn);
  const [notices, setNotices] = useState(noticesNow);
  const turnOn = async () => {
    setSound(true);
    if (noticesNow() === 'ask') await Notification.requestPermission();
    setNotices(noticesNow());
  };
  const says = [on ? alertText.isOn : soundPossible() ? null : alertText.soundNone, SAYS[notices]].filter((line) => line !== null);
  return (
    <section>
      <PartTitle>{alertText.title}</PartTitle>
      <div className="flex flex-col gap-2 border-t border-rule pt-3">
        {says.length > 0 ? <p className="text-dim">{says.join(' ')}</p> : null}
        {soundPossible() && (!on || notices === 'ask') ? (
          <Button className="self-start" onClick={() => void turnOn()}>
            {alertText.on}
          </Button>
        ) : null}
        {on ? (
          <Button kind="quiet" className="self-start" onClick={() => setSound(false)}>
            {alertText.off}
          </Button>
        ) : null}
      </div>
    </section>
  );
}
