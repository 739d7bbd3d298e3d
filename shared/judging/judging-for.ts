import type { MachinePage } from '../schemas/homes.ts';
import type { StoredProbe, StoredRating } from '../schemas/ratings.ts';
import type { JudgedBy, RunConditions } from '../schemas/runs.ts';
import { toCelsius } from '../units.ts';
import { judgedBy, probeOf, ratingOf } from './judged-by.ts';
import type { Judging, JudgingMark } from './judging.ts';

/** What a machine is specified to have for a heat setting; null where nothing is. */
export function specifiedFor(
  machine: MachinePage,
  setting: RunConditions['setting'],
): JudgedBy | null {
  const specified = machine.specified.find((each) => each.setting === setting);
  return specified ? judgedBy(specified.rating, specified.limit) : null;
}

/** The same machine judged by another cycling rating: its own safety still stands. */
export function judgedByAnother(
  machine: MachinePage,
  setting: RunConditions['setting'],
  rating: StoredRating,
): JudgedBy | null {
  const specified = machine.specified.find((each) => each.setting === setting);
  return judgedBy(rating, specified?.limit ?? null);
}

type Said = {
  judged: JudgedBy | null;
  probe: StoredProbe | null;
  conditions: RunConditions;
  marks: JudgingMark[];
  minCycles: number;
};

/** Rating, probe and what the technician said, as the engine takes them. */
export function judgingFor({ judged, probe, conditions, marks, minCycles }: Said): Judging {
  const { roomTemp, roomUnit, load } = conditions;
  return {
    rating: ratingOf(judged),
    probe: probeOf(probe),
    marks,
    load,
    roomC: roomTemp === null ? null : toCelsius(roomTemp, roomUnit),
    minCycles,
    reference: null,
  };
}

/** Before anybody said anything: the machine's main heat setting, an unnamed probe. */
export function judgingAtFirst(machine: MachinePage, minCycles: number): Judging {
  const judged = specifiedFor(machine, machine.specified[0]?.setting ?? 'high');
  const rating = ratingOf(specifiedFor(machine, 'high') ?? judged);
  return {
    rating,
    probe: probeOf(null),
    marks: [],
    load: null,
    roomC: null,
    minCycles,
    reference: null,
  };
}
