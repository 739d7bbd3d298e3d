import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { Router } from 'express';
import type { Express, RequestHandler } from 'express';
import type { Knex } from 'knex';
import type { Logger } from 'pino';
import { errorHandler, unknownPath } from './error-handler.ts';
import { guard } from './guard.ts';
import { requestLog } from './log.ts';
import { createAudit } from './people/audit-repository.ts';
import { createBackOff } from './people/back-off.ts';
import { createPasswords } from './people/passwords.ts';
import { createPeopleRepository } from './people/people-repository.ts';
import { peopleRoutes } from './people/people-routes.ts';
import { createPeopleService } from './people/people-service.ts';
import { createSessionCookie } from './people/session-cookie.ts';
import { createSessionRepository } from './people/session-repository.ts';
import { sessionRoutes } from './people/session-routes.ts';
import { createSessionService } from './people/session-service.ts';
import { createShopRepository } from './people/shop-repository.ts';
import { shopRoutes } from './people/shop-routes.ts';
import { createShopService } from './people/shop-service.ts';
import { createSignInFailuresRepository } from './people/sign-in-failures-repository.ts';
import type { Workers } from './pool.ts';
import { jsonOnly, sameOrigin } from './same-origin.ts';
import { createScopeRepository } from './scope-repository.ts';
import type { Secrets } from './secrets.ts';
import { noStore, securityHeaders } from './security-headers.ts';

export type AppParts = {
  db: Knex;
  /** Where uploads lie. */
  dataDir: string;
  now: () => Date;
  workers: Workers;
  /** What people type to come here; null: whatever address on this machine they used, over http. */
  publicUrl: URL | null;
  secrets: Secrets;
  logger: Logger;
  /** Serves the browser application; none in tests of the API. */
  pages?: RequestHandler;
  /** Vite serves the pages: no Content-Security-Policy. */
  development?: boolean;
};

/** Wires repositories to services to routes by hand. Opens nothing, starts nothing. */
export function createApp(parts: AppParts): Express {
  const { publicUrl, logger, pages, development = false } = parts;
  const app = express();
  app.disable('x-powered-by');
  // `?a=1&a=2` is a list and nothing nests; X-Forwarded-… is nobody's word (trust proxy stays off).
  app.set('query parser', 'simple');

  app.use(securityHeaders({ https: publicUrl?.protocol === 'https:', development }));
  app.use(requestLog(logger));
  app.use(compression());
  app.use('/api', createApi(parts));
  if (pages) app.use(pages);
  app.use(unknownPath);
  app.use(errorHandler);
  return app;
}

function createApi({ db, now, workers, publicUrl, secrets }: AppParts): Router {
  const audit = createAudit(db, now);
  const passwords = createPasswords(workers.passwords, secrets.pepper);
  const people = createPeopleRepository(db);
  const sessionRows = createSessionRepository(db);
  const backOff = createBackOff(createSignInFailuresRepository(db), now, secrets.pepper);
  const shop = createShopService(createShopRepository(db), audit);
  const cookie = createSessionCookie(publicUrl);
  const sessions = createSessionService({
    people,
    sessions: sessionRows,
    passwords,
    backOff,
    audit,
    tokenKey: secrets.tokenKey,
    now,
  });
  const peopleService = createPeopleService({
    people,
    sessions: sessionRows,
    passwords,
    audit,
    now,
  });

  // Uploads tell who sent them (server/runs).
  const scope = { ...createScopeRepository(db), sentUpload: () => Promise.resolve(false) };

  const api = Router();
  api.use(noStore);
  api.use(
    sameOrigin(publicUrl, (req) =>
      audit({ userId: null, event: 'malicious_csrf', subject: `${req.method} ${req.path}` }),
    ),
  );
  api.use(cookieParser());
  api.use(jsonOnly);
  api.use(express.json({ limit: '100kb', inflate: false }));
  api.use(guard({ sessions, cookie, scope, audit }));

  api.use(sessionRoutes(sessions, shop, cookie));
  api.use(peopleRoutes(peopleService));
  api.use(shopRoutes(shop));

  // server/runs and server/shares add their routers here.

  return api;
}
