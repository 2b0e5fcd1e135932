import type { RequestHandler } from 'express';
import type { Server } from 'node:http';

/** Vite in this process: the client from its sources, reloaded as they change, over the same port. */
export async function devClient(server: Server): Promise<RequestHandler> {
  const { createServer } = await import('vite');
  const vite = await createServer({ server: { middlewareMode: true, ws: { server } }, appType: 'spa' });
  return vite.middlewares;
}
