import type { Probe } from './rating.ts';
import type { RunLeg } from './run-facts.ts';
import { median } from './statistics/quantile.ts';

/** A response time over this share of the on-time hides overshoot and undershoot alike. */
const MOST_SHARE = 0.25;

/**
 * Whether the probe is too slow for the machine's cycles: its response time is known and is over a quarter of the
 * usual on-time (heating legs between turning points; the first heat from cold is no on-time).
 */
export function isProbeTooSlow({ responseS }: Probe, legs: RunLeg[]): boolean {
  if (responseS === null) return false;
  const onTimesS = legs
    .filter(
      ({ kind, from, to }) =>
        kind === 'heating' && from.turnedBy === 'machine' && to.turnedBy === 'machine',
    )
    .map(({ from, to }) => to.timeS - from.timeS);
  return onTimesS.length > 0 && responseS > MOST_SHARE * median(onTimesS);
}
