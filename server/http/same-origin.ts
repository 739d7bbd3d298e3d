import type { Request, RequestHandler } from 'express';
import { AppError } from '#server/errors.ts';

const READS = ['GET', 'HEAD', 'OPTIONS'];

/**
 * A page of another origin changes nothing here. Browsers say where a request comes from in
 * Sec-Fetch-Site, older ones in Origin; what sends neither is not a page.
 */
export function sameOrigin(publicUrl: URL | null, onRefusal: (req: Request) => Promise<void>) {
  const handler: RequestHandler = async (req, _res, next) => {
    if (READS.includes(req.method) || comesFromHere(req, publicUrl)) return next();
    await onRefusal(req);
    throw new AppError(403, 'other-origin', 'This came from another site, so nothing was done.');
  };
  return handler;
}

function comesFromHere(req: Request, publicUrl: URL | null): boolean {
  const site = req.get('sec-fetch-site');
  if (site) return site === 'same-origin' || site === 'none';
  const origin = req.get('origin');
  if (!origin) return true;
  return origin === (publicUrl?.origin ?? `http://${req.get('host')}`);
}

/** JSON only, since a form of another site can send anything but that. An upload is a form with a file. */
export const jsonOnly: RequestHandler = (req, _res, next) => {
  const isUpload = req.method === 'POST' && req.path === '/uploads';
  const type = isUpload ? 'multipart/form-data' : 'application/json';
  if (!hasBody(req) || req.is(type)) return next();
  throw new AppError(415, 'wrong-type', isUpload ? 'Send a form with a file.' : 'Send JSON.');
};

function hasBody(req: Request): boolean {
  return 'transfer-encoding' in req.headers || Number(req.get('content-length') ?? 0) > 0;
}
