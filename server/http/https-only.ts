import type { Request, RequestHandler } from 'express';
import { AppError } from '#server/errors.ts';

/**
 * Where the shop's address is https, what came to the trusted proxy in the clear goes no further:
 * a page is sent to the same page at the public address, a program is told so. A browser would keep
 * no cookie there, and a sign-in would fail without a word.
 */
export function httpsOnly(publicUrl: URL | null): RequestHandler {
  return (req, res, next) => {
    if (publicUrl?.protocol !== 'https:' || !cameInTheClear(req)) return next();
    const isPage = ['GET', 'HEAD'].includes(req.method) && req.originalUrl.startsWith('/');
    if (!isPage || /^\/api(\/|$)/i.test(req.path)) {
      throw new AppError(403, 'https-only', `Open ${publicUrl.origin} instead.`);
    }
    res.redirect(308, publicUrl.origin + req.originalUrl);
  };
}

/** In the trusted proxy's own words. One that says nothing of it, and this machine, are let through. */
function cameInTheClear(req: Request): boolean {
  const isByTrustedProxy = req.ips.length > 0;
  return isByTrustedProxy && req.get('x-forwarded-proto') !== undefined && !req.secure;
}
