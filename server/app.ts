import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { Router } from 'express';
import type { Express, RequestHandler } from 'express';
import type { Knex } from 'knex';
import type { Logger } from 'pino';
import { errorHandler, unknownPath } from './error-handler.ts';
import { customerRoutes } from './homes/customer-routes.ts';
import { homeRoutes } from './homes/home-routes.ts';
import { machineRoutes } from './homes/machine-routes.ts';
import { guard } from './http/guard.ts';
import { httpsOnly } from './http/https-only.ts';
import { jsonOnly, sameOrigin } from './http/same-origin.ts';
import { noStore, securityHeaders } from './http/security-headers.ts';
import { clientAddress, trustOneHop, type TrustedProxy } from './http/trusted-proxy.ts';
import { jobRoutes } from './jobs/job-routes.ts';
import { createScopeRepository } from './jobs/scope-repository.ts';
import { visitRoutes } from './jobs/visit-routes.ts';
import { requestLog } from './log.ts';
import { peopleRoutes } from './people/people-routes.ts';
import { createSessionCookie } from './people/session-cookie.ts';
import { sessionRoutes } from './people/session-routes.ts';
import { shopRoutes } from './people/shop-routes.ts';
import type { Workers } from './pool.ts';
import { probeRoutes } from './ratings/probe-routes.ts';
import { ratingRoutes } from './ratings/rating-routes.ts';
import { runRoutes } from './runs/run-routes.ts';
import { uploadRoutes } from './runs/upload-routes.ts';
import type { Secrets } from './secrets.ts';
import { sendingRoutes } from './sendings/sending-routes.ts';
import { shareRoutes } from './shares/share-routes.ts';
import { wireJobs } from './wiring/wire-jobs.ts';
import { wirePeople } from './wiring/wire-people.ts';
import { wireRuns } from './wiring/wire-runs.ts';
import { wireSendings } from './wiring/wire-sendings.ts';

export type AppParts = {
  db: Knex;
  /** Where uploads lie. */
  dataDir: string;
  now: () => Date;
  workers: Workers;
  /** What people type to come here; null: whatever address on this machine they used, over http. */
  publicUrl: URL | null;
  /** Who may say whose request it is; nobody where left out. */
  trustedProxy?: TrustedProxy;
  secrets: Secrets;
  logger: Logger;
  /** Serves the browser application; none in tests of the API. */
  pages?: RequestHandler;
  /** What judging again is done by; the engine's own version where left out. */
  engineVersion?: string;
  /** Vite serves the pages: no Content-Security-Policy. */
  development?: boolean;
};

/** Wires repositories to services to routes by hand. Opens nothing, starts nothing. */
export function createApp(parts: AppParts): Express {
  const { publicUrl, trustedProxy = [], logger, pages, development = false } = parts;
  const app = express();
  app.disable('x-powered-by');
  // Nothing of the API may be kept, so nothing needs to be compared.
  app.disable('etag');
  // `?a=1&a=2` is a list and nothing nests.
  app.set('query parser', 'simple');
  trustOneHop(app, trustedProxy);

  app.use(securityHeaders({ https: publicUrl?.protocol === 'https:', development }));
  app.use(requestLog(logger));
  app.use(httpsOnly(publicUrl));
  app.use(compression());
  app.use('/api', createApi(parts));
  if (pages) app.use(pages);
  app.use(unknownPath);
  app.use(errorHandler);
  return app;
}

function createApi(parts: AppParts): Router {
  const { db, publicUrl } = parts;
  const people = wirePeople(parts);
  const jobs = wireJobs(parts, people);
  const runs = wireRuns(parts, people, jobs);
  const { audit, sessions, shop } = people;
  const cookie = createSessionCookie(publicUrl);
  const scope = { ...createScopeRepository(db), sentUpload: runs.uploads.sentUpload };

  const api = Router();
  api.use(noStore);
  api.use(
    sameOrigin(publicUrl, (req) =>
      audit({
        userId: null,
        event: 'malicious_csrf',
        subject: `${req.method} ${req.path}`,
        details: { address: clientAddress(req) },
      }),
    ),
  );
  api.use(cookieParser());
  api.use(jsonOnly);
  api.use(express.json({ limit: '100kb', inflate: false }));
  api.use(guard({ sessions, cookie, scope, audit }));

  api.use(sessionRoutes(sessions, shop, cookie));
  api.use(peopleRoutes(people.peopleService));
  api.use(shopRoutes(shop));
  api.use(customerRoutes(jobs.customerService));
  api.use(homeRoutes(jobs.homeService, scope.ownHomeIds));
  api.use(machineRoutes(jobs.machineService, jobs.jobService.runsOfMachine));
  api.use(ratingRoutes(jobs.ratingService));
  api.use(probeRoutes(jobs.probeService));
  api.use(jobRoutes(jobs.jobService, jobs.visitService));
  api.use(visitRoutes(jobs.visitService, jobs.roundsService));
  api.use(sendingRoutes(wireSendings(parts, people, runs), parts.now));
  api.use(uploadRoutes(runs.uploads, runs.receive));
  api.use(runRoutes(runs));
  api.use(shareRoutes({ ...runs, shop: shop.get, publicUrl }));
  return api;
}
