/** Where to go after signing in: a path of this site that the address names, else the start. An address of another site is not followed. */
export function nextPage(search: string, origin: string): string {
  const next = new URLSearchParams(search).get('next') ?? '/';
  if (!next.startsWith('/') || !URL.canParse(next, origin)) return '/';
  const url = new URL(next, origin);
  return url.origin === origin ? url.pathname + url.search + url.hash : '/';
}
