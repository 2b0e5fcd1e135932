/** One field that can't be taken; `in` is the body where it isn't said. */
export interface FieldRefusal {
  pointer: string;
  code: string;
  params?: Record<string, string | number>;
  in?: 'body' | 'path' | 'query';
}

/**
 * A refusal that people or programs can act on: a code, never a sentence. The middleware makes problem+json (RFC 9457) of it;
 * `text/en` makes the sentence. `fields` puts the code beside a form field (JSON pointer into the body,
 * or into path or query where `in` says so). A parameter `retryAfterS` becomes the header `Retry-After`.
 */
export class Refusal extends Error {
  readonly status: number;
  readonly code: string;
  readonly params: Record<string, string | number>;
  readonly fields: FieldRefusal[];

  constructor(
    status: 400 | 401 | 403 | 404 | 405 | 409 | 413 | 415 | 422 | 429 | 503,
    code: string,
    params: Record<string, string | number> = {},
    fields: Refusal['fields'] = [],
  ) {
    super(code);
    this.name = 'Refusal';
    this.status = status;
    this.code = code;
    this.params = params;
    this.fields = fields;
  }
}

export const notFound = (code: string, params?: Record<string, string | number>): Refusal => new Refusal(404, code, params);
export const conflict = (code: string, params?: Record<string, string | number>): Refusal => new Refusal(409, code, params);
export const invalid = (code: string, pointer: string, params?: Record<string, string | number>): Refusal =>
  new Refusal(422, code, params, [{ pointer, code, params }]);
