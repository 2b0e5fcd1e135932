import type { Request, RequestHandler } from 'express';
import { Refusal } from './refusal.ts';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Refuses what another site makes a signed-in browser send: changes are allowed from the same origin only. Browsers say so in
 * `Sec-Fetch-Site` on HTTPS and localhost; on plain http in a house's network they send `Origin` alone, which is held against
 * Host and the address people type. A program sends neither and carries no one else's cookie.
 */
export function refuseCrossSite(publicUrl: string | null): RequestHandler {
  const own = publicUrl === null ? null : new URL(publicUrl).origin;
  return (req, _res, next) => {
    if (SAFE.has(req.method) || isSameSite(req, own)) next();
    else next(new Refusal(403, 'cross-site'));
  };
}

/** Also for the sockets' handshake, where the method is GET but Origin matters. */
export function isSameSite(req: Pick<Request, 'headers'>, ownOrigin: string | null): boolean {
  const site = req.headers['sec-fetch-site'];
  // `none`: typed by the user, never a page.
  if (site === 'same-origin' || site === 'none') return true;
  const { origin, host } = req.headers;
  if (origin === undefined) return site === undefined;
  if (origin === ownOrigin) return true;
  // A browser that says "same-site" or "cross-site" has judged by scheme, host and port: Host can't overrule it.
  return site === undefined && URL.canParse(origin) && new URL(origin).host === host;
}
