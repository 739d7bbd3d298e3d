import type { DisplayUnit } from '#shared/units.ts';
import { formatRated, formatSpan } from '#shared/wording/format.ts';
import { wordsOfGuard, type GuardFacts } from './guard-panel.tsx';

/** The octagon that takes the place of clock and chart: three words, the time left, one thing to do. */
export function HaltPanel(facts: GuardFacts) {
  const { head, todo } = haltWords(facts);
  const count = countdown(facts);
  return (
    <section className="sw-halt" aria-label="Guard">
      <Hatch isSwapped={Math.floor(facts.nowS) % 2 === 1} />
      <div className="sw-oct-edge">
        <div className="sw-oct">
          <p className="sw-halt-head">{head}</p>
          {count && (
            <p className="sw-halt-count fig">
              <b>{count.figure}</b>
              <span className="whitespace-nowrap">{count.words}</span>
            </p>
          )}
          <p className="sw-halt-do">{todo}</p>
        </div>
      </div>
    </section>
  );
}

/** What stands on the octagon, and is read out. */
export function haltWords(facts: GuardFacts): { head: string; todo: string } {
  const { view, isGas, isHeatOff } = facts;
  if (view.says === 'unplug') {
    return {
      head: 'Pull the plug',
      todo: isGas
        ? 'It climbs on with the heat off. Pull the plug, then shut the gas. On a smell of gas touch no switch or plug: get people out and call the gas emergency line.'
        : 'It climbs on with the heat off. Pull the plug or open the breaker. Stay with it until it falls.',
    };
  }
  return {
    head: 'Cut the heat',
    todo: isHeatOff
      ? `${wordsOfGuard(facts).why ?? 'Heat off is marked.'} Keep reading.`
      : 'Turn the selector to no-heat and let the drum turn. Then press Heat off.',
  };
}

function countdown({ view, nowS, unit, highLimitC, lastC }: GuardFacts) {
  if (lastC !== null && lastC >= highLimitC) return reached(highLimitC, unit);
  const likelyS = view.forecast?.highLimit?.likelyS;
  if (likelyS == null) return null;
  const leftS = Math.max(0, likelyS - nowS);
  return { figure: minutes(leftS), words: `to ${formatRated(highLimitC, unit)}` };
}

function reached(highLimitC: number, unit: DisplayUnit) {
  return { figure: '0:00', words: `past ${formatRated(highLimitC, unit)}` };
}

function minutes(leftS: number): string {
  const wholeS = Math.floor(leftS);
  return wholeS < 60 ? `0:${String(wholeS).padStart(2, '0')}` : formatSpan(wholeS);
}

/** Hatch and ground change places once a second: under the three flashes a second of WCAG 2.3.1. */
function Hatch({ isSwapped }: { isSwapped: boolean }) {
  return (
    <svg className="sw-halt-hatch" aria-hidden="true">
      <defs>
        <pattern
          id="sw-hatch"
          width="22.5"
          height="22.5"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <rect
            className="sw-halt-stripe"
            x={isSwapped ? 11 : 0}
            width="11"
            height="45"
            fill="var(--stop)"
          />
        </pattern>
      </defs>
      <rect width="100%" height="100%" fill="url(#sw-hatch)" />
    </svg>
  );
}
