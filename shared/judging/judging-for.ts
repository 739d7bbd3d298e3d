import type { ReferenceRun } from '../analysis/analysis.ts';
import type { StoredRating } from '../schemas/ratings.ts';
import type { JudgedBy, JudgedWith, RunConditions } from '../schemas/runs.ts';
import { toCelsius } from '../units.ts';
import { judgedBy, ratingOf } from './judged-by.ts';
import { probeToJudgeWith } from './judged-with.ts';
import type { Judging, JudgingMark } from './judging.ts';
import { specifiedFor, type Specifying } from './specified-for.ts';

/** The same machine judged by another cycling rating: its own safety still stands. */
export function judgedByAnother(
  machine: Specifying,
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
  /** A clean run of the machine to go by; left out or null where none is known. */
  reference?: ReferenceRun | null;
};

/** Rating, probe and what the technician said, as the engine takes them. */
export function judgingFor(said: Said): Judging {
  const { judged, judgedWith, conditions, marks, minCycles, reference = null } = said;
  const { roomTemp, roomUnit, load } = conditions;
  return {
    rating: ratingOf(judged),
    probe: probeToJudgeWith(judgedWith),
    marks,
    load,
    roomC: roomTemp === null ? null : toCelsius(roomTemp, roomUnit),
    minCycles,
    reference,
  };
}

/** Before anybody said anything: the machine's main heat setting, an unnamed probe. */
export function judgingAtFirst(machine: Specifying, minCycles: number): Judging {
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
