import type { RoundsItem } from '#shared/schemas/jobs.ts';
import type { RunCard } from '#shared/schemas/runs.ts';
import { OUTCOME_WORDS } from '../../format/job-words.ts';

/** "5 visits", "1 visit", "No visits". */
export function countVisits(count: number): string {
  if (count === 0) return 'No visits';
  return `${count} visit${count === 1 ? '' : 's'}`;
}

/** Nothing is left to do here today. */
export function isDone({ job }: RoundsItem): boolean {
  return job.state === 'fixed' || job.state === 'closed';
}

/** The visit that comes next, or goes on now; null where the day is over. */
export function nextVisit(visits: RoundsItem[], nowMs: number): RoundsItem | null {
  return visits.find((visit) => !isDone(visit) && visit.endsAtMs > nowMs) ?? null;
}

/** "opens in 20 min", "opens in 2 h", "open now". */
export function opensWords({ startsAtMs }: RoundsItem, nowMs: number): string {
  const minutes = Math.ceil((startsAtMs - nowMs) / 60_000);
  if (minutes <= 0) return 'the next is open now';
  if (minutes < 90) return `the next opens in ${minutes}\u00a0min`;
  return `the next opens in ${Math.round(minutes / 60)}\u00a0h`;
}

/** "2 runs, the last: proven, 5 of 6 inside"; null where there is none. */
export function runsWords(runs: RunCard[]): string | null {
  const last = [...runs].sort((a, b) => a.startedAtMs - b.startedAtMs).at(-1);
  if (!last) return null;
  const count = runs.length === 1 ? '1 run:' : `${runs.length} runs, the last:`;
  const inside = last.calls.filter((call) => call === 'inside').length;
  const calls = last.calls.length > 0 ? `, ${inside} of ${last.calls.length} inside` : '';
  return `${count} ${OUTCOME_WORDS[last.outcome]}${calls}`;
}

/** Visits by technician, in the order of each one's first. */
export function byTechnician(visits: RoundsItem[]): { name: string; visits: RoundsItem[] }[] {
  const groups = new Map<string, { name: string; visits: RoundsItem[] }>();
  for (const visit of visits) {
    const { id, name } = visit.technician;
    const group = groups.get(id) ?? { name, visits: [] };
    group.visits.push(visit);
    groups.set(id, group);
  }
  return [...groups.values()];
}
