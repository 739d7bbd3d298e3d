import type { RunEventOf } from './run-event.ts';

/** A span measured by the phone's clock alone, and what the server's clock said to it. */
export type ClockSpan = {
  fromS: number;
  toS: number;
  /** `unchecked`: the server was not reached both before and after. */
  check: 'unchecked' | 'agrees' | 'differs';
  /** By how much the span is longer on the phone's clock than on the server's, s; null where it is not checked. */
  longerS: number | null;
};

/** Beyond this the two clocks do not agree: the server's answer may itself take a second. */
const AGREES_WITHIN_S = 2;

/** Each span asleep, held against the server's clock where that was read both before it and after it. */
export function clockSpans(
  spans: readonly RunEventOf<'asleep'>[],
  checks: readonly RunEventOf<'clock-check'>[],
): ClockSpan[] {
  return spans.map(({ fromS, atS, n }) => {
    const before = checks.filter((check) => check.n < n && check.atS <= fromS).at(-1);
    const after = checks.find((check) => check.n > n);
    if (!before || !after) return { fromS, toS: atS, check: 'unchecked', longerS: null };
    const byPhoneS = after.atS - before.atS;
    const byServerS = (after.serverMs - before.serverMs) / 1000;
    const longerS = byPhoneS - byServerS;
    const agrees = Math.abs(longerS) <= AGREES_WITHIN_S;
    return { fromS, toS: atS, check: agrees ? 'agrees' : 'differs', longerS };
  });
}
