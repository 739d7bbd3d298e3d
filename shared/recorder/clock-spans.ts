import type { Reached, RunEvent, RunEventOf } from './run-event.ts';

/** A span measured by the phone's clock alone, and what the server's clock said to it. */
export type ClockSpan = {
  fromS: number;
  toS: number;
  /** `unchecked`: what the server said does not tell. */
  check: 'unchecked' | 'agrees' | 'differs';
  /** By how much the span is longer on the phone's clock than on the server's, s; null where it was read once only. */
  longerS: number | null;
};

/** Beyond this the two clocks do not agree: the server's answer may itself take a second. */
const AGREES_WITHIN_S = 2;
/** What is sent over a bad line can be so long on its way; it can only make the server's clock look ahead. */
const ON_ITS_WAY_S = 30;

type Check = Pick<RunEventOf<'clock-check'>, 'n' | 'atS' | 'serverMs'>;

/**
 * Each span asleep, held against the server's clock: where that was read both before the span and after it, by the
 * time between; where the server was reached once only, with the run's end, by what both clocks said then.
 *
 * @param events of one run, in order
 */
export function clockSpans(events: readonly RunEvent[]): ClockSpan[] {
  const checks = events.filter((event) => event.kind === 'clock-check');
  const end = events.findLast((event) => event.kind === 'end');
  const asleep = events.filter((event) => event.kind === 'asleep');
  return asleep.map((span) => ({
    fromS: span.fromS,
    toS: span.atS,
    ...heldAgainst(span, checks, end),
  }));
}

type Held = Pick<ClockSpan, 'check' | 'longerS'>;
const UNCHECKED: Held = { check: 'unchecked', longerS: null };

function heldAgainst(
  { fromS, n }: RunEventOf<'asleep'>,
  checks: readonly Check[],
  end: RunEventOf<'end'> | undefined,
): Held {
  const before = checks.filter((check) => check.n < n && check.atS <= fromS).at(-1);
  const after = checks.find((check) => check.n > n);
  if (before && after) return told(longerBetween(before, after), 0);
  if (!end?.reached) return UNCHECKED;
  if (before) return told(longerBetween(before, checkByEnd(end, end.reached)), ON_ITS_WAY_S);
  // What the phone's clock did before, nothing tells: that it was right as the run came is the most that can be said.
  const aheadS = (end.reached.phoneMs - end.reached.serverMs) / 1000;
  return Math.abs(aheadS) <= AGREES_WITHIN_S ? { check: 'agrees', longerS: null } : UNCHECKED;
}

/** @param onItsWayS what the server's clock may be ahead by without a fault of the phone's */
function told(longerS: number, onItsWayS: number): Held {
  if (Math.abs(longerS) <= AGREES_WITHIN_S) return { check: 'agrees', longerS };
  const isByTheLine = longerS < 0 && longerS >= -AGREES_WITHIN_S - onItsWayS;
  return isByTheLine ? UNCHECKED : { check: 'differs', longerS };
}

function longerBetween(before: Check, after: Check): number {
  return after.atS - before.atS - (after.serverMs - before.serverMs) / 1000;
}

/** The run's time goes on after its end by the phone's clock. */
function checkByEnd({ n, atS, wallMs }: RunEventOf<'end'>, { serverMs, phoneMs }: Reached): Check {
  return { n: n + 1, atS: atS + (phoneMs - wallMs) / 1000, serverMs };
}
