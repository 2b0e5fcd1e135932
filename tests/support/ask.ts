/** An answer as tests look at it. */
export interface Answer {
  status: number;
  headers: Headers;
  // What a route answers is the test's to know.
  body: unknown;
}

/** One HTTP request; a body is sent as JSON. */
export async function ask(url: string, method: string, path: string, given: { cookie?: string; body?: unknown; headers?: Record<string, string> } = {}): Promise<Answer> {
  const headers: Record<string, string> = { ...(given.body === undefined ? {} : { 'content-type': 'application/json' }), ...(given.cookie ? { cookie: given.cookie } : {}), ...given.headers };
  const response = await fetch(`${url}${path}`, { method, headers, redirect: 'manual', body: given.body === undefined ? undefined : typeof given.body === 'string' ? given.body : JSON.stringify(given.body) });
  const text = await response.text();
  return { status: response.status, headers: response.headers, body: text === '' ? null : parse(text) };
}

function parse(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return text;
  }
}
