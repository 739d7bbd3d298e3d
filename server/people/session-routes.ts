import { Router } from 'express';
import { clientAddress } from '#server/http/trusted-proxy.ts';
import { validate } from '#server/validate.ts';
import { passwordChangeSchema, signInSchema } from '#shared/schemas/people.ts';
import type { Session } from '#shared/schemas/people.ts';
import type { SessionCookie } from './session-cookie.ts';
import type { SessionService } from './session-service.ts';
import type { ShopService } from './shop-service.ts';
import { signedInOf } from './signed-in.ts';

export function sessionRoutes(sessions: SessionService, shop: ShopService, cookie: SessionCookie) {
  const router = Router();

  router.post('/session', async (req, res) => {
    const asked = validate(signInSchema, req.body);
    const from = { oldToken: cookie.read(req), address: clientAddress(req) };
    const { person, token, expiresAtMs } = await sessions.signIn(asked, from);
    cookie.write(res, token, expiresAtMs);
    res.json({ person, shop: await shop.get() } satisfies Session);
  });

  router.get('/session', async (req, res) => {
    const { person } = signedInOf(req);
    res.json({ person, shop: await shop.get() } satisfies Session);
  });

  router.delete('/session', async (req, res) => {
    await sessions.signOut(signedInOf(req));
    cookie.clear(res);
    res.status(204).end();
  });

  router.put('/password', async (req, res) => {
    await sessions.changePassword(signedInOf(req), validate(passwordChangeSchema, req.body));
    res.status(204).end();
  });

  return router;
}
