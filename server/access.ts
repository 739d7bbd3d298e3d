import type { Request } from 'express';
import type { Role } from '#shared/schemas/people.ts';
import type { Scope } from './jobs/scope-repository.ts';

/**
 * Who may do what: the one table. A request without a row here is answered as if there were nothing,
 * and a row's condition that does not hold is answered the same way.
 */
export type Rule = {
  method: 'GET' | 'POST' | 'PUT' | 'DELETE';
  /** Below `/api`. Every `:name` is an id. */
  path: string;
  who: 'anyone' | readonly Role[];
  /** What must hold for a technician besides. */
  technician?: Condition;
  /** What must hold for everybody. */
  always?: Condition;
};

export type Asked = { personId: string; req: Request; id: string };
type Condition = (scope: Scope, asked: Asked) => Promise<boolean>;

const ALL = ['owner', 'office', 'technician'] as const;
const DESK = ['owner', 'office'] as const;
const OWNER = ['owner'] as const;
/** Whoever records on a visit: the owner, and the technician whose visit it is. */
const FIELD = ['owner', 'technician'] as const;

// A technician sees the homes of own visits and all that was recorded on the machines there,
// and writes on own visits only.
const seesHome: Condition = (scope, { personId, id }) => scope.seesHome(personId, id);
const seesMachine: Condition = (scope, { personId, id }) => scope.seesMachine(personId, id);
const seesJob: Condition = (scope, { personId, id }) => scope.seesJob(personId, id);
const seesRun: Condition = (scope, { personId, id }) => scope.seesRun(personId, id);
const ownJob: Condition = (scope, { personId, id }) => scope.ownsJob(personId, id);
const ownVisit: Condition = (scope, { personId, id }) => scope.ownsVisit(personId, id);
const ownRun: Condition = (scope, { personId, id }) => scope.ownsRun(personId, id);
const ownRunOfShare: Condition = (scope, { personId, id }) => scope.ownsRunOfShare(personId, id);
const ownUpload: Condition = (scope, { personId, id }) => scope.sentUpload(personId, id);

const seesHomeInBody: Condition = (scope, { personId, req }) =>
  scope.seesHome(personId, text(req.body, 'homeId'));
const staysInSight: Condition = async (scope, asked) =>
  (await seesMachine(scope, asked)) && (await seesHomeInBody(scope, asked));
const ownVisitInQuery: Condition = (scope, { personId, req }) =>
  scope.ownsVisit(personId, text(req.query, 'visitId'));

export const RULES: readonly Rule[] = [
  { method: 'GET', path: '/health', who: 'anyone' },
  { method: 'GET', path: '/shop-card', who: 'anyone' },
  { method: 'POST', path: '/session', who: 'anyone' },
  { method: 'GET', path: '/session', who: ALL },
  { method: 'DELETE', path: '/session', who: ALL },
  { method: 'PUT', path: '/password', who: ALL },

  { method: 'GET', path: '/people', who: OWNER },
  { method: 'POST', path: '/people', who: OWNER },
  { method: 'POST', path: '/people/:id/disable', who: OWNER },
  { method: 'POST', path: '/people/:id/enable', who: OWNER },
  { method: 'GET', path: '/technicians', who: DESK },
  { method: 'GET', path: '/shop', who: ALL },
  { method: 'PUT', path: '/shop', who: OWNER },

  { method: 'GET', path: '/customers', who: DESK },
  { method: 'POST', path: '/customers', who: DESK },
  { method: 'GET', path: '/customers/:id', who: DESK },
  { method: 'PUT', path: '/customers/:id', who: DESK },
  { method: 'GET', path: '/homes', who: ALL },
  { method: 'POST', path: '/homes', who: DESK },
  { method: 'GET', path: '/homes/:id', who: ALL, technician: seesHome },
  { method: 'PUT', path: '/homes/:id', who: DESK },
  { method: 'POST', path: '/machines', who: ALL, technician: seesHomeInBody },
  { method: 'GET', path: '/machines/:id', who: ALL, technician: seesMachine },
  { method: 'PUT', path: '/machines/:id', who: ALL, technician: staysInSight },
  { method: 'PUT', path: '/machines/:id/specified', who: ALL, technician: seesMachine },
  { method: 'POST', path: '/machines/:id/parts', who: ALL, technician: seesMachine },
  { method: 'POST', path: '/machines/:id/parts/:partId/remove', who: ALL, technician: seesMachine },
  { method: 'GET', path: '/machines/:id/runs', who: ALL, technician: seesMachine },
  { method: 'GET', path: '/machines/:id/references', who: ALL, technician: seesMachine },

  { method: 'GET', path: '/ratings', who: ALL },
  { method: 'POST', path: '/ratings', who: DESK },
  { method: 'PUT', path: '/ratings/:id', who: DESK },
  { method: 'GET', path: '/probes', who: ALL },
  { method: 'POST', path: '/probes', who: DESK },
  { method: 'PUT', path: '/probes/:id', who: DESK },
  { method: 'GET', path: '/calibrations', who: ALL },
  { method: 'POST', path: '/probes/:id/calibrations', who: DESK },

  { method: 'GET', path: '/jobs', who: ALL },
  { method: 'POST', path: '/jobs', who: DESK },
  { method: 'GET', path: '/jobs/:id', who: ALL, technician: seesJob },
  { method: 'PUT', path: '/jobs/:id', who: ALL, technician: ownJob },
  { method: 'POST', path: '/jobs/:id/visits', who: DESK },
  { method: 'GET', path: '/visits/:id', who: ALL, technician: ownVisit },
  { method: 'POST', path: '/visits/:id/safety', who: FIELD, technician: ownVisit },
  { method: 'GET', path: '/rounds', who: ALL },
  // Each thing in it is let through or refused as the same act by its own route (server/sendings).
  { method: 'POST', path: '/sendings', who: ALL },

  { method: 'POST', path: '/uploads', who: FIELD, technician: ownVisitInQuery },
  { method: 'GET', path: '/uploads/:id', who: FIELD, always: ownUpload },
  { method: 'PUT', path: '/uploads/:id/choices', who: FIELD, always: ownUpload },
  { method: 'DELETE', path: '/uploads/:id', who: FIELD, always: ownUpload },
  { method: 'POST', path: '/uploads/:id/accept', who: FIELD, always: ownUpload },

  { method: 'GET', path: '/runs/:id', who: ALL, technician: seesRun },
  { method: 'GET', path: '/runs/:id/trace', who: ALL, technician: seesRun },
  { method: 'GET', path: '/runs/:id/samples', who: ALL, technician: seesRun },
  { method: 'GET', path: '/runs/:id/file', who: ALL, technician: seesRun },
  { method: 'POST', path: '/runs/:id/analyses', who: FIELD, technician: ownRun },
  { method: 'POST', path: '/runs/:id/notes', who: FIELD, technician: ownRun },
  { method: 'PUT', path: '/runs/:id/notes/:noteId', who: FIELD, technician: ownRun },
  { method: 'DELETE', path: '/runs/:id/notes/:noteId', who: FIELD, technician: ownRun },

  { method: 'GET', path: '/runs/:id/shares', who: ALL, technician: ownRun },
  { method: 'POST', path: '/runs/:id/shares', who: ALL, technician: ownRun },
  { method: 'POST', path: '/shares/:id/revoke', who: ALL, technician: ownRunOfShare },
  { method: 'POST', path: '/shared/open', who: 'anyone' },
];

/** May put runs on this visit, and write on the runs of it. The same as FIELD with `ownVisit`, for pages to know. */
export function mayRecord(person: { id: string; role: Role }, technicianId: string): boolean {
  return person.role === 'owner' || (person.role === 'technician' && person.id === technicianId);
}

function text(from: unknown, name: string): string {
  if (typeof from !== 'object' || from === null) return '';
  const value: unknown = Reflect.get(from, name);
  return typeof value === 'string' ? value : '';
}
