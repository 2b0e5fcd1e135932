import { randomUUID } from 'node:crypto';
import { pinoHttp } from 'pino-http';
import type { RequestHandler } from 'express';
import type { Logger } from '../log.ts';

declare module 'http' {
  interface IncomingMessage {
    /** Given by `requestLog`, in the log and in the header `X-Request-Id`. */
    id: string | number | object;
  }
}

/** Gives each request an id and writes one line when it ends: method, path without query, status, time. Bodies and headers stay out. */
export function requestLog(log: Logger): RequestHandler {
  return pinoHttp({
    logger: log,
    genReqId: (_req, res) => {
      const id = randomUUID();
      res.setHeader('X-Request-Id', id);
      return id;
    },
    customLogLevel: (_req, res, error) => (error !== undefined || res.statusCode >= 500 ? 'warn' : 'debug'),
    serializers: {
      req: (req: { id: unknown; method: string; url: string }) => ({ id: req.id, method: req.method, path: req.url.split('?')[0] }),
      res: (res: { statusCode: number }) => ({ status: res.statusCode }),
    },
  });
}
