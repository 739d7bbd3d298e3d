import type { RequestHandler } from 'express';
import helmet from 'helmet';

const NONE = ["'none'"];
const SELF = ["'self'"];

/** The Content-Security-Policy: nothing but our own files, and no string that becomes a script. */
const POLICY = {
  'default-src': NONE,
  'script-src': SELF,
  'connect-src': SELF,
  'img-src': ["'self'", 'blob:'],
  'style-src': SELF,
  'font-src': SELF,
  'worker-src': SELF,
  'manifest-src': SELF,
  'base-uri': NONE,
  'object-src': NONE,
  'form-action': SELF,
  'frame-ancestors': NONE,
  'require-trusted-types-for': ["'script'"],
  // Lets one address become a script: the service worker's (client/device/versions.ts).
  'trusted-types': ['fusekeeper-worker'],
};

/** Live probes hang on Bluetooth or on a serial port; a page that frames ours, or that we framed, gets neither. */
const PERMISSIONS =
  'bluetooth=(self), serial=(self), camera=(), geolocation=(), microphone=(), payment=()';

/**
 * On every answer, errors included. Over plain http the browser is not told to insist on https.
 * In development there is no policy, since Vite puts a script into the page.
 */
export function securityHeaders(how: { https: boolean; development: boolean }): RequestHandler {
  const headers = helmet({
    contentSecurityPolicy: how.development ? false : { useDefaults: false, directives: POLICY },
    strictTransportSecurity: how.https ? { maxAge: 31_536_000, includeSubDomains: false } : false,
    referrerPolicy: { policy: 'no-referrer' },
    crossOriginOpenerPolicy: { policy: 'same-origin' },
    crossOriginResourcePolicy: { policy: 'same-origin' },
    xFrameOptions: { action: 'deny' },
  });
  return (req, res, next) => {
    res.set('X-Robots-Tag', 'noindex, nofollow');
    res.set('Permissions-Policy', PERMISSIONS);
    headers(req, res, next);
  };
}

/** What the API says is for the asker, now; no cache may keep it. */
export const noStore: RequestHandler = (_req, res, next) => {
  res.set('Cache-Control', 'no-store');
  next();
};
