import { createSecretKey, randomBytes, randomUUID } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Express } from 'express';
import request from 'supertest';
import { afterAll, inject } from 'vitest';
import { createApp } from '#server/app.ts';
import type { AppParts } from '#server/app.ts';
import { migrate, openDatabase } from '#server/db.ts';
import { createLogger } from '#server/log.ts';
import { createPeopleRepository } from '#server/people/people-repository.ts';
import { createSessionRepository } from '#server/people/session-repository.ts';
import { signToken } from '#server/people/session-token.ts';
import { createShopRepository } from '#server/people/shop-repository.ts';
import { closeWorkers, openWorkers } from '#server/pool.ts';
import { openDataFolders } from '#server/runs/data-folders.ts';
import type { Person, Role } from '#shared/schemas/people.ts';

/** A moment that tests count from: Wednesday, 4 March 2026, 15:00 UTC, 10:00 in the shop. */
export const NOW = new Date('2026-03-04T15:00:00Z');

export type TestApp = Awaited<ReturnType<typeof createTestApp>>;
/** Somebody signed in, with the requests they send. */
export type Agent = ReturnType<typeof request.agent> & { person: Person; cookie: string };

/**
 * The real app on a migrated in-memory database with one shop and nobody in it. Gone after the test file.
 * `lines` collects what it logs.
 */
export async function createTestApp(given: Partial<AppParts> = {}) {
  const lines: string[] = [];
  const db = openDatabase(':memory:');
  await migrate(db);
  const parts: AppParts = {
    db,
    dataDir: await mkdtemp(join(tmpdir(), 'fusekeeper-test-')),
    now: () => NOW,
    workers: openWorkers({ beside: inject('workersBeside'), niceIncrement: 0 }),
    publicUrl: null,
    secrets: { tokenKey: createSecretKey(randomBytes(48)), pepper: randomBytes(48) },
    logger: createLogger({ write: (line) => void lines.push(line) }),
    ...given,
  };
  await openDataFolders(parts.dataDir);
  await createShopRepository(db).insert(TEST_SHOP, false);
  const app = createApp(parts);

  afterAll(async () => {
    await closeWorkers(parts.workers);
    await db.destroy();
    await rm(parts.dataDir, { recursive: true });
  });

  return {
    app,
    lines,
    ...parts,
    agent: (role: Role, name?: string) => newAgent(app, parts, role, name),
    agentOf: (person: Person) => agentOf(app, parts, person),
  };
}

export const TEST_SHOP = {
  name: 'Harrow Lane Appliance Repair',
  town: 'Tessford',
  phone: '555-0100',
  email: 'desk@harrowlane.example',
  zone: 'America/New_York',
  unit: 'F',
  minCycles: 3,
} as const;

/** A new person with an open session, without the third of a second that a password costs. */
async function newAgent(app: Express, parts: AppParts, role: Role, name = `A ${role}`) {
  const id = randomUUID();
  const person: Person = { id, name, email: `${id}@harrowlane.example`, role, disabledAtMs: null };
  const createdAtMs = parts.now().getTime();
  const passwordHash = 'no password fits this';
  await createPeopleRepository(parts.db).insert({ ...person, passwordHash, createdAtMs });
  return agentOf(app, parts, person);
}

/** A session of its own for somebody who is there. */
async function agentOf(app: Express, parts: AppParts, person: Person): Promise<Agent> {
  const nowMs = parts.now().getTime();
  const times = { createdAtMs: nowMs, seenAtMs: nowMs, endedAtMs: null };
  const session = { id: randomUUID(), userId: person.id, ...times };
  await createSessionRepository(parts.db).insert(session);
  const claims = { sessionId: session.id, userId: person.id };
  const token = signToken(claims, parts.secrets.tokenKey, nowMs + 30 * 86_400_000);
  const cookie = `fusekeeper=${token}`;
  return Object.assign(request.agent(app).set('Cookie', cookie), { person, cookie });
}
