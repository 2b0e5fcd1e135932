import * as z from 'zod/mini';
import { contract } from './contract.ts';

/** What the interface says of itself. */
export const apiContracts = {
  document: contract({
    id: 'api.document', method: 'GET', path: '/api/openapi.json', permission: 'public', summary: 'This document (OpenAPI 3.1)',
    response: z.looseObject({ openapi: z.string(), info: z.looseObject({ title: z.string() }), paths: z.record(z.string(), z.unknown()) }),
  }),
};
