import { createAudit } from '#server/people/audit-repository.ts';
import { createBackOff } from '#server/people/back-off.ts';
import { createPasswords } from '#server/people/passwords.ts';
import { createPeopleRepository } from '#server/people/people-repository.ts';
import { createPeopleService } from '#server/people/people-service.ts';
import { createSessionRepository } from '#server/people/session-repository.ts';
import { createSessionService } from '#server/people/session-service.ts';
import { createShopRepository } from '#server/people/shop-repository.ts';
import { createShopService } from '#server/people/shop-service.ts';
import { createSignInFailuresRepository } from '#server/people/sign-in-failures-repository.ts';
import type { AppParts } from '#server/app.ts';

export type PeopleWiring = ReturnType<typeof wirePeople>;

/** The shop, its people, and who is signed in. */
export function wirePeople({ db, now, workers, secrets }: AppParts) {
  const { tokenKey, pepper } = secrets;
  const audit = createAudit(db, now);
  const passwords = createPasswords(workers.passwords, pepper);
  const people = createPeopleRepository(db);
  const sessions = createSessionRepository(db);
  const backOff = createBackOff(createSignInFailuresRepository(db), now, pepper);
  const common = { people, sessions, passwords, audit, now };
  return {
    audit,
    people,
    peopleService: createPeopleService(common),
    sessions: createSessionService({ ...common, backOff, tokenKey }),
    shop: createShopService(createShopRepository(db), audit),
  };
}
