import express, { type Request, type Response } from 'express';
import type { Contract } from '#shared/contracts/contract.ts';
import { none } from '#shared/contracts/contract.ts';
import { Refusal } from './refusal.ts';

/** Bytes of a body at most; only device events, which have their own door, may be larger. */
const BODY_MAX = 102_400;

// The type was judged before; whatever arrives is read as JSON.
const parse = express.json({ limit: BODY_MAX, type: () => true });

/** The body of a request as JSON; null where there is none. 415 when it claims to be anything else. */
export async function jsonBody(contract: Contract, req: Request, res: Response): Promise<unknown> {
  if (contract.method === 'GET' || !hasBody(req)) return null;
  if (!req.is('application/json')) throw new Refusal(415, 'body.type');
  await new Promise<void>((done, fail) => {
    parse(req, res, (error?: unknown) => (error === undefined ? done() : fail(error)));
  });
  const body: unknown = req.body ?? null;
  // Programs like to send {} where nothing is asked for.
  return contract.body === (none as unknown) && isEmptyObject(body) ? null : body;
}

const hasBody = (req: Request): boolean => req.headers['transfer-encoding'] !== undefined || Number(req.headers['content-length'] ?? 0) > 0;

const isEmptyObject = (body: unknown): boolean => typeof body === 'object' && body !== null && !Array.isArray(body) && Object.keys(body).length === 0;
