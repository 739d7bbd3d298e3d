import { useQuery } from '@tanstack/react-query';
import type { VisitPage } from '#shared/schemas/jobs.ts';
import type { KeptThing } from '../../device/device-db.ts';
import { useKeptThings, type KeptByState } from '../../device/use-kept-things.ts';
import { visitQuery } from '../../api/visits.ts';

/** A visit as it is here: with what was done on this device, and whether the shop has that yet. */
export type VisitHere = VisitPage & { unsent: { safety: boolean; notes: boolean } };

/** The visit, with what this device did to it laid over what the server last said. */
export function useVisit(id: string) {
  const visit = useQuery(visitQuery(id));
  const kept = useKeptThings();
  return { visit, here: visit.data && kept ? overlay(visit.data, kept) : undefined };
}

/** Kept things on top, oldest first. One applied already counts too, until the server's word of it has come. */
export function overlay(visit: VisitPage, { unsent, applied }: KeptByState): VisitHere {
  let here: VisitHere = { ...visit, unsent: { safety: false, notes: false } };
  for (const thing of [...applied, ...unsent].sort((a, b) => a.order - b.order)) {
    here = withThing(here, thing);
  }
  return here;
}

function withThing(visit: VisitHere, thing: KeptThing): VisitHere {
  const { kind, payload, state } = thing;
  if (typeof payload !== 'object' || payload === null) return visit;
  if (!('visitId' in payload) || payload.visitId !== visit.id) return visit;
  const isUnsent = state === 'unsent';
  if (kind === 'safety-ticks' && 'tickedAtMs' in payload) {
    if (visit.safetyTickedAtMs !== null) return visit;
    const safetyTickedAtMs = Number(payload.tickedAtMs);
    return { ...visit, safetyTickedAtMs, unsent: { ...visit.unsent, safety: isUnsent } };
  }
  if (kind === 'visit-edit' && 'notes' in payload && 'basedOn' in payload) {
    // Made on what is shown: it is the next step. Otherwise the server has it already, or something newer.
    if (payload.basedOn !== visit.notesVersion) return visit;
    const edited = { notes: String(payload.notes), notesVersion: thing.id, notesEdited: null };
    return { ...visit, ...edited, unsent: { ...visit.unsent, notes: isUnsent } };
  }
  return visit;
}
