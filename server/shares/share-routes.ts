import { Router } from 'express';
import type { z } from 'zod';
import { clientAddress } from '#server/http/trusted-proxy.ts';
import { personOf } from '#server/people/signed-in.ts';
import { validate } from '#server/validate.ts';
import type { Shop } from '#shared/schemas/people.ts';
import {
  newShareSchema,
  openShareSchema,
  type linkProblemSchema,
  type SharedRun,
} from '#shared/schemas/shares.ts';
import type { OpenLimit } from './open-limit.ts';
import type { StoredShare } from './share-repository.ts';
import type { ShareService } from './share-service.ts';

export type ShareRouteParts = {
  shares: ShareService;
  toSharedRun: (share: StoredShare) => Promise<SharedRun>;
  limit: OpenLimit;
  shop: () => Promise<Shop>;
  /** null: the address that the person came by. */
  publicUrl: URL | null;
};

type LinkProblem = z.infer<typeof linkProblemSchema>;

export function shareRoutes(parts: ShareRouteParts): Router {
  const { shares, toSharedRun, limit, shop, publicUrl } = parts;
  const router = Router();

  router.get('/runs/:id/shares', async (req, res) => {
    res.json(await shares.list(req.params.id));
  });

  router.post('/runs/:id/shares', async (req, res) => {
    const { days } = validate(newShareSchema, req.body);
    const { share, token } = await shares.make(personOf(req), req.params.id, days);
    const url = `${publicUrl?.origin ?? `http://${req.get('host')}`}/shared#${token}`;
    res.status(201).json({ ...share, url });
  });

  router.post('/shares/:id/revoke', async (req, res) => {
    res.json(await shares.revoke(personOf(req), req.params.id));
  });

  // Wrong, expired and revoked links get one and the same answer.
  router.post('/shared/open', async (req, res) => {
    const { token } = validate(openShareSchema, req.body);
    limit.check(clientAddress(req));
    const share = await shares.open(token);
    if (share) return void res.json(await toSharedRun(share));
    limit.countFailed(clientAddress(req));
    res.status(404).json(linkProblem(await shop()));
  });

  return router;
}

function linkProblem({ name, phone, email }: Shop): LinkProblem {
  return {
    code: 'link-not-open',
    message: 'This link does not open. It may be mistyped, out of date, or taken back by the shop.',
    shop: { name, phone, email },
  };
}
