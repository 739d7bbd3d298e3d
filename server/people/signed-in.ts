import type { Request } from 'express';
import { signInNeeded } from '#server/errors.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { SignedIn } from './session-service.ts';

declare module 'express-serve-static-core' {
  interface Request {
    /** Put here by the guard of server/access.ts, for every route that is not for anyone. */
    signedIn?: SignedIn;
  }
}

/** @throws {AppError} 401 where the guard let nobody through */
export function signedInOf(req: Pick<Request, 'signedIn'>): SignedIn {
  if (!req.signedIn) throw signInNeeded();
  return req.signedIn;
}

export function personOf(req: Pick<Request, 'signedIn'>): Person {
  return signedInOf(req).person;
}
