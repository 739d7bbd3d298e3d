import type { RequestHandler } from 'express';
import { z } from 'zod';
import type { Person } from '#shared/schemas/people.ts';
import { RULES } from '#server/access.ts';
import type { Rule } from '#server/access.ts';
import { notAllowed, notFound, signInNeeded } from '#server/errors.ts';
import type { Audit } from '#server/people/audit-repository.ts';
import type { SessionCookie } from '#server/people/session-cookie.ts';
import type { SessionService } from '#server/people/session-service.ts';
import type { Scope } from '#server/jobs/scope-repository.ts';
import { clientAddress } from './trusted-proxy.ts';

export type GuardParts = {
  sessions: SessionService;
  cookie: SessionCookie;
  scope: Scope;
  audit: Audit;
};

/** Stands before every route: what the table does not allow goes no further. */
export function guard({ sessions, cookie, scope, audit }: GuardParts): RequestHandler {
  return async (req, _res, next) => {
    const found = findRule(req.method, req.path);
    if (!found) throw notFound();
    const { rule, ids } = found;
    if (rule.who === 'anyone') return next();

    const token = cookie.read(req);
    const signedIn = token === undefined ? undefined : await sessions.find(token);
    if (!signedIn) throw signInNeeded();
    const { person } = signedIn;
    const denied = async (error: Error) => {
      const details = { address: clientAddress(req) };
      await audit({ userId: person.id, event: 'authz_fail', subject: named(rule), details });
      return error;
    };

    if (!rule.who.includes(person.role)) throw await denied(notAllowed());
    // An id that is none cannot name anything; the database is not asked.
    if (!ids.every(isId)) throw notFound();
    const asked = { personId: person.id, req, id: ids[0] ?? '' };
    const holds = await Promise.all(conditions(rule, person).map((holds) => holds(scope, asked)));
    if (holds.includes(false)) throw await denied(notFound());

    req.signedIn = signedIn;
    next();
  };
}

/** The row for a request, and the ids in its path. HEAD is a GET whose body is not sent. */
export function findRule(method: string, path: string): { rule: Rule; ids: string[] } | undefined {
  const asked = method === 'HEAD' ? 'GET' : method;
  for (const { rule, pattern } of PATTERNS) {
    const match = rule.method === asked && pattern.exec(path);
    if (match) return { rule, ids: match.slice(1) };
  }
  return undefined;
}

// As the router sees paths: case does not matter, nor a slash at the end.
const PATTERNS = RULES.map((rule) => ({
  rule,
  pattern: new RegExp(`^${rule.path.replace(/:\w+/g, '([^/]+)')}/?$`, 'i'),
}));

function conditions(rule: Rule, person: Person) {
  const forRole = person.role === 'technician' ? [rule.technician] : [];
  return [rule.always, ...forRole].filter((condition) => condition !== undefined);
}

function named(rule: Rule): string {
  return `${rule.method} ${rule.path}`;
}

function isId(text: string): boolean {
  return z.uuid().safeParse(text).success;
}
