import type { Config } from '../../config.ts';

type Settings = Pick<Config, 'https' | 'port'>;

/**
 * On HTTPS the `__Host-` prefix binds a cookie to this host and to Secure. On plain http the port is in the name, as browsers share
 * cookies between ports and two copies of the program may run side by side.
 */
export function cookieName(purpose: 'session' | 'display', { https, port }: Settings): string {
  return https ? `__Host-lanewright-${purpose}` : `lanewright-${purpose}-${port}`;
}

/** Value of a cookie in a Cookie header, or null. Only for values of our own making, which need no decoding. */
export function readCookie(cookies: string | undefined, name: string): string | null {
  for (const pair of (cookies ?? '').split(';')) {
    const [key, value] = pair.trim().split('=', 2);
    if (key === name && value) return value;
  }
  return null;
}

/** `Set-Cookie` value that scripts can't read; `maxAgeS` 0 clears it. */
export function setCookie(name: string, value: string, maxAgeS: number, { https }: Settings): string {
  return `${name}=${value}; HttpOnly; Max-Age=${maxAgeS}; Path=/; SameSite=Lax${https ? '; Secure' : ''}`;
}
