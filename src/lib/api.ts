import type { BodyOf, Contract, ParamsOf, QueryOf, ResponseOf } from '#shared/contracts/contract.ts';

export interface FieldProblem {
  /** JSON pointer into the body: `/toLane`. */
  pointer: string;
  code: string;
  params?: Record<string, string | number>;
}

/** A refusal of the server, or `network.away` (status 0) when it wasn't reached. Codes become sentences in shared/text. */
export class Problem extends Error {
  readonly status: number;
  readonly code: string;
  readonly params: Record<string, string | number>;
  readonly fields: readonly FieldProblem[];
  /** Seconds to wait before asking again, where the server says so. */
  readonly retryAfter: number | null;

  constructor(status: number, code: string, rest: { params?: Record<string, string | number>; fields?: readonly FieldProblem[]; retryAfter?: number | null } = {}) {
    super(code);
    this.name = 'Problem';
    this.status = status;
    this.code = code;
    this.params = rest.params ?? {};
    this.fields = rest.fields ?? [];
    this.retryAfter = rest.retryAfter ?? null;
  }

  /** Code for one field of a form, by its name in the body (`toLane`, `passes/0/length`). */
  field(name: string): FieldProblem | null {
    return this.fields.find((f) => f.pointer.replace(/^\//, '') === name) ?? null;
  }
}

export const isAway = (error: unknown): boolean => error instanceof Problem && (error.status === 0 || error.status === 503);

interface Input<C> {
  params?: ParamsOf<C>;
  query?: Partial<QueryOf<C>>;
  body?: BodyOf<C>;
  /** A repeat with the same key has the effect of once (kept a day by the server). */
  idempotencyKey?: string;
  signal?: AbortSignal;
}

const TIMEOUT_MS = 10_000;

/** Calls a route as its contract says. Gives the response's body, or throws a `Problem`. */
export async function call<C extends Contract>(contract: C, input: Input<C> = {}): Promise<ResponseOf<C>> {
  const response = await reach(addressOf(contract.path, input.params as object | undefined, input.query), contract.method, input);
  const answer: unknown = response.status === 204 ? null : await bodyOf(response);
  if (response.ok) return answer as ResponseOf<C>;
  throw problemOf(response, answer);
}

async function reach(address: string, method: string, input: Input<Contract>): Promise<Response> {
  const headers: Record<string, string> = { accept: 'application/json' };
  if (input.body !== undefined && input.body !== null) headers['content-type'] = 'application/json';
  if (input.idempotencyKey) headers['idempotency-key'] = input.idempotencyKey;
  const timeout = AbortSignal.timeout(TIMEOUT_MS);
  try {
    return await fetch(address, {
      method,
      headers,
      credentials: 'same-origin',
      body: headers['content-type'] ? JSON.stringify(input.body) : undefined,
      signal: input.signal ? AbortSignal.any([input.signal, timeout]) : timeout,
    });
  } catch (error) {
    if (input.signal?.aborted) throw error;
    throw new Problem(0, 'network.away');
  }
}

async function bodyOf(response: Response): Promise<unknown> {
  try {
    return await response.json();
  } catch {
    return null;
  }
}

function problemOf(response: Response, answer: unknown): Problem {
  const said = (typeof answer === 'object' && answer !== null ? answer : {}) as { code?: string; params?: Record<string, string | number>; errors?: (FieldProblem & { in: string })[] };
  const retryAfter = Number(response.headers.get('retry-after'));
  return new Problem(response.status, said.code ?? `http.${response.status}`, {
    params: said.params,
    fields: said.errors?.filter((error) => error.in === 'body'),
    retryAfter: retryAfter > 0 ? retryAfter : null,
  });
}

/** Fills `:name` parts of a path and appends the query; an undefined query value is left out. */
export function addressOf(path: string, params: object = {}, query: object = {}): string {
  const given = params as Record<string, unknown>;
  const filled = path.replace(/:(\w+)/g, (_, name: string) => encodeURIComponent(String(given[name])));
  const pairs = Object.entries(query).filter(([, value]) => value !== undefined && value !== null);
  return pairs.length === 0 ? filled : `${filled}?${new URLSearchParams(pairs.map(([k, v]) => [k, String(v)])).toString()}`;
}

/** A new key for `idempotencyKey`. `crypto.randomUUID` doesn't exist on plain http in a house's own network. */
export function newKey(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(16)), (b) => b.toString(16).padStart(2, '0')).join('');
}
