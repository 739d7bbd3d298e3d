import type { MachinePage } from '../schemas/homes.ts';
import type { StoredRating } from '../schemas/ratings.ts';
import type { JudgedBy, JudgedWith, RunConditions } from '../schemas/runs.ts';
import { toCelsius } from '../units.ts';
import { judgedBy, ratingOf } from './judged-by.ts';
import { probeToJudgeWith } from './judged-with.ts';
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
  judgedWith: JudgedWith | null;
  conditions: RunConditions;
  marks: JudgingMark[];
  minCycles: number;
};

/** Rating, probe and what the technician said, as the engine takes them. */
export function judgingFor({ judged, judgedWith, conditions, marks, minCycles }: Said): Judging {
  const { roomTemp, roomUnit, load } = conditions;
  return {
    rating: ratingOf(judged),
    probe: probeToJudgeWith(judgedWith),
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
    probe: probeToJudgeWith(null),
    marks: [],
    load: null,
    roomC: null,
    minCycles,
    reference: null,
  };
}
