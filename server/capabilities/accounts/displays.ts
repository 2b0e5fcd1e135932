import type { DisplayLink } from '#shared/contracts/accounts.ts';
import { cookieName, setCookie } from '#server/platform/auth/cookies.ts';
import type { Config } from '#server/config.ts';
import type { Clock } from '#server/platform/clock.ts';
import { notFound } from '#server/platform/http/refusal.ts';
import type { CentreRef, HttpSide } from '#server/platform/http/route.ts';
import { displayHandle } from './identify.ts';
import type { accountReadModel } from './read-model.ts';
import type { displayStore } from './store-displays.ts';

/** Browsers keep no cookie longer (RFC 6265bis): 400 days. The link itself lives until it is revoked. */
const COOKIE_S = 400 * 24 * 3600;

interface Parts {
  displays: ReturnType<typeof displayStore>;
  readModel: ReturnType<typeof accountReadModel>;
  clock: Clock;
  config: Pick<Config, 'https' | 'port'>;
  revoked: (handle: string) => void;
}

/** Links by which a screen on the wall sees one centre's floor without an account. */
export function displayCommands({ displays, readModel, clock, config, revoked }: Parts) {
  return {
    list: (centre: CentreRef): Promise<DisplayLink[]> => displays.list(centre.id),

    async add(centre: CentreRef, name: string, by: string): Promise<{ display: DisplayLink; path: string }> {
      const { display, token } = await displays.add(centre.id, name, by, clock.now());
      return { display, path: `/d/${token}` };
    },

    async revoke(centre: CentreRef, id: string): Promise<{ ok: true }> {
      if (!(await displays.revoke(centre.id, id, clock.now()))) throw notFound('display.unknown');
      revoked(displayHandle(id));
      return { ok: true };
    },

    /** Leaves the token in an HttpOnly cookie and leads to the wall, so that it doesn't stay in the address bar. */
    async open(token: string, http: HttpSide): Promise<null> {
      const found = await readModel.display(token);
      if (found === null) throw notFound('display.unknown');
      http.setCookie(setCookie(cookieName('display', config), token, COOKIE_S, config));
      http.redirect(`/${found.identity.centres[0]?.slug ?? ''}/wall`);
      return null;
    },
  };
}

export type DisplayCommands = ReturnType<typeof displayCommands>;
