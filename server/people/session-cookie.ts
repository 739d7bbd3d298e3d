import type { CookieOptions, Request, Response } from 'express';

export type SessionCookie = ReturnType<typeof createSessionCookie>;

/** Over https only the strictest cookie will do; on this machine over http a browser refuses Secure. */
export function createSessionCookie(publicUrl: URL | null) {
  const isHttps = publicUrl?.protocol === 'https:';
  const name = isHttps ? '__Host-fusekeeper' : 'fusekeeper';
  const options: CookieOptions = { httpOnly: true, sameSite: 'lax', secure: isHttps, path: '/' };

  return {
    name,

    read(req: Request): string | undefined {
      const cookies: unknown = req.cookies;
      if (typeof cookies !== 'object' || cookies === null) return undefined;
      const value: unknown = Reflect.get(cookies, name);
      return typeof value === 'string' ? value : undefined;
    },

    write(res: Response, token: string, expiresAtMs: number): void {
      res.cookie(name, token, { ...options, expires: new Date(expiresAtMs) });
    },

    clear(res: Response): void {
      res.clearCookie(name, options);
    },
  };
}
