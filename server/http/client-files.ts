import type { Server, ServerResponse } from 'node:http';
import { fileURLToPath } from 'node:url';
import express, { Router } from 'express';
import type { RequestHandler } from 'express';
import { notFound } from '#server/errors.ts';

const fromSource = import.meta.url.endsWith('.ts');
const BUILT = fileURLToPath(
  new URL(fromSource ? '../../dist/client' : '../client', import.meta.url),
);

export function builtClient(): ClientPages {
  return { pages: clientFiles(), close: () => Promise.resolve() };
}

/** The built application. Files under /assets carry a hash of what they hold in their name. */
export function clientFiles(folder = BUILT): RequestHandler {
  const router = Router();
  router.use('/assets', express.static(`${folder}/assets`, { immutable: true, maxAge: '1y' }));
  // Its own words: those of the file server would tell where the files lie.
  router.use('/assets', () => {
    throw notFound();
  });
  router.use(express.static(folder, { index: false, dotfiles: 'ignore', setHeaders: noCache }));
  // Any other address is a page of the application, which finds out itself which.
  router.get('/{*path}', (req, res, next) => {
    if (!req.accepts('html')) return next();
    noCache(res);
    res.sendFile('index.html', { root: folder, cacheControl: false });
  });
  return router;
}

/** `close` lets go of what holds the server open. */
export type ClientPages = { pages: RequestHandler; close(): Promise<void> };

/** Vite inside this process: one port, hot reload on the same server. */
export async function clientFromSource(server: Server): Promise<ClientPages> {
  const { createServer } = await import('vite');
  const vite = await createServer({
    server: { middlewareMode: true, hmr: { server } },
    appType: 'spa',
  });
  return { pages: vite.middlewares, close: () => vite.close() };
}

function noCache(res: ServerResponse): void {
  res.setHeader('Cache-Control', 'no-cache');
}
