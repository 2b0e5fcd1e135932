import type { ErrorRequestHandler, Request, RequestHandler, Response } from 'express';
import { fieldSentence, refusalSentence } from '#shared/text/en/refusals.ts';
import { isDatabaseAway, isLostRace } from '../db/errors.ts';
import type { Logger } from '../log.ts';
import { Refusal } from './refusal.ts';

/** RFC 9457, with our code and its parameters, so that a client can word it itself. */
export interface Problem {
  type: string;
  title: string;
  status: number;
  code: string;
  params: Record<string, string | number>;
  errors: { in: 'body' | 'path' | 'query'; pointer: string; code: string; params: Record<string, string | number>; detail: string }[];
  /** The request's id in the log. */
  instance: string;
}

/** Seconds after which a caller may try again. */
const AWAY_RETRY_S = 2;
const BUSY_RETRY_S = 1;

export const problemType = (code: string): string => `urn:lanewright:problem:${code}`;

/** A refusal, and anything unexpected, as the document that goes out. */
export function problemOf(refusal: Refusal | { status: 500; code: 'unexpected' }, requestId: string): Problem {
  const params = 'params' in refusal ? refusal.params : { request: requestId };
  const fields = 'fields' in refusal ? refusal.fields : [];
  return {
    type: problemType(refusal.code),
    title: refusalSentence(refusal.code, params),
    status: refusal.status,
    code: refusal.code,
    params,
    errors: fields.map((field) => ({
      in: field.in ?? 'body', pointer: field.pointer, code: field.code, params: field.params ?? {}, detail: fieldSentence(field.code, field.params ?? {}),
    })),
    instance: `urn:lanewright:request:${requestId}`,
  };
}

/** Whatever went wrong as a refusal, or null when it is a fault of ours. */
export function refusalOf(error: unknown): Refusal | null {
  if (error instanceof Refusal) return error;
  if (isDatabaseAway(error)) return new Refusal(503, 'database.away', { retryAfterS: AWAY_RETRY_S });
  if (isLostRace(error)) return new Refusal(503, 'database.busy', { retryAfterS: BUSY_RETRY_S });
  return error instanceof URIError ? new Refusal(400, 'path.invalid') : parserRefusal(error);
}

/** Errors of Express's body parser and router carry a status; their words stay inside. */
function parserRefusal(error: unknown): Refusal | null {
  const { type, status, limit } = (typeof error === 'object' && error !== null ? error : {}) as { type?: string; status?: number; limit?: number };
  if (type === 'entity.too.large') return new Refusal(413, 'body.too-large', { maxKb: Math.floor((limit ?? 0) / 1000) });
  if (type === 'entity.parse.failed') return new Refusal(400, 'body.not-json');
  if (status === 415) return new Refusal(415, 'body.type');
  return typeof status === 'number' && status >= 400 && status < 500 ? new Refusal(400, 'request.invalid') : null;
}

export function sendProblem(req: Request, res: Response, error: unknown, log: Logger): void {
  const refusal = refusalOf(error);
  const requestId = String(req.id);
  if (refusal === null || refusal.status === 503) log[refusal ? 'warn' : 'error']({ err: error, request: requestId, method: req.method, path: req.path }, refusal?.code ?? 'unexpected');
  if (res.headersSent) {
    res.destroy();
    return;
  }
  const wait = refusal?.params['retryAfterS'];
  if (wait !== undefined) res.setHeader('Retry-After', String(wait));
  if (refusal?.status === 401) res.setHeader('WWW-Authenticate', 'Session realm="lanewright"');
  res.status(refusal?.status ?? 500).type('application/problem+json').send(JSON.stringify(problemOf(refusal ?? { status: 500, code: 'unexpected' }, requestId)));
}

/** Last under `/api`: nothing is here. */
export const routeUnknown: RequestHandler = (_req, _res, next) => next(new Refusal(404, 'route.unknown'));

/** The one place where an error becomes an answer; mount it last of all. */
export function problems(log: Logger): ErrorRequestHandler {
  // Express tells an error handler by its four parameters.
  return (error, req, res, _next) => sendProblem(req, res, error, log);
}
