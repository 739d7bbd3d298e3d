import type { GuardView } from '#shared/analysis/guard/guard-state.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatRated, formatSpan, formatStep } from '#shared/wording/format.ts';
import { wordGuard } from '#shared/wording/word-guard.ts';
import { NoteSign, WatchSign } from '../../components/signs.tsx';
import { ShrinkBar } from './shrink-bar.tsx';

export type GuardFacts = {
  view: GuardView;
  nowS: number;
  unit: DisplayUnit;
  highLimitC: number;
  ceilingC: number;
  /** The last reading; null before the first. */
  lastC: number | null;
  isGas: boolean;
  isHeatOff: boolean;
};

/** One printed line, or the tinted band. Cut-heat takes the place of clock and chart: see HaltPanel. */
export function GuardPanel(facts: GuardFacts) {
  const { view, nowS, unit, highLimitC, lastC } = facts;
  if (view.says !== 'watch') {
    return (
      <section className="sw-guard" aria-label="Guard">
        <NoteSign className="size-8" />
        <p>
          <b>Guard is watching.</b>{' '}
          {lastC === null
            ? `The limit is ${formatRated(highLimitC, unit)}.`
            : `${roundStep(highLimitC - lastC, unit)} to the limit.`}
        </p>
      </section>
    );
  }
  const crossing = view.forecast?.highLimit ?? null;
  return (
    <section className="sw-guard sw-guard-watch" aria-label="Guard">
      <WatchSign className="mt-0.5 size-[38px] text-watch" />
      <div>
        <p>
          <b>Watch.</b> {watchSentence(facts)}
        </p>
        {crossing?.likelyS != null && (
          <ShrinkBar
            leftS={crossing.likelyS - nowS}
            earliestS={crossing.earliestS - nowS}
            latestS={crossing.latestS === null ? null : crossing.latestS - nowS}
            limitWords={formatRated(highLimitC, unit)}
          />
        )}
      </div>
    </section>
  );
}

/** The forecast in words, as LOOK has it. */
export function watchSentence(facts: GuardFacts): string {
  const { view, nowS, unit, highLimitC } = facts;
  const crossing = view.forecast?.highLimit;
  const limit = formatRated(highLimitC, unit);
  if (!crossing || crossing.likelyS === null) return wordsOfGuard(facts).why ?? '';
  const leftS = Math.max(0, crossing.likelyS - nowS);
  const inTime = `At this rate it reaches ${limit} in ${formatSpan(leftS)}`;
  if (crossing.latestS === null) {
    return `${inTime}, at the earliest in ${formatSpan(Math.max(0, crossing.earliestS - nowS))}.`;
  }
  const reachS = (crossing.latestS - crossing.earliestS) / 2;
  return `${inTime}, give or take ${formatSpan(Math.max(1, reachS))}.`;
}

/** `59 °F`: whole degrees, this is read from the corner of an eye. */
function roundStep(stepK: number, unit: DisplayUnit): string {
  return formatStep(stepK, unit).replace(/\.[0-9]/, '');
}

/** The guard's reasons and doubts in words. */
export function wordsOfGuard({ view, nowS, unit, highLimitC, ceilingC, isGas }: GuardFacts) {
  const fuel = isGas ? 'gas' : 'electric';
  return wordGuard(view, { unit, fuel, rating: { ceilingC, highLimitC }, nowS });
}
