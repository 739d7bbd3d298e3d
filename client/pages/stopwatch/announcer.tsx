import { useState } from 'react';
import { formatSpan } from '#shared/wording/format.ts';
import type { GuardFacts } from './guard-panel.tsx';
import { watchSentence } from './guard-panel.tsx';
import { haltWords } from './halt-panel.tsx';

/** A countdown that is read out more often than this drowns everything else. */
const SPOKEN_EVERY_S = 15;

/** What a screen reader says: what was kept and the watch, in their turn; to cut the heat, at once. */
export function Announcer({ said, facts }: { said: string; facts: GuardFacts }) {
  const { says } = facts.view;
  const isHalt = says === 'cut-heat' || says === 'unplug';
  const guard = useSpoken(guardWords(facts), says, facts.nowS);
  return (
    <>
      <p role="status" className="sr-only">
        {said}
      </p>
      <p role="status" aria-label="Guard" className="sr-only">
        {isHalt ? '' : guard}
      </p>
      <p role="alert" className="sr-only" key={says}>
        {isHalt && guard}
      </p>
    </>
  );
}

/** Words at the moment that the guard changed, and anew once so much time has passed. */
function useSpoken(words: string, says: string, nowS: number): string {
  const [spoken, setSpoken] = useState({ words, says, atS: nowS });
  const isDue = nowS - spoken.atS >= SPOKEN_EVERY_S && words !== spoken.words;
  if (says !== spoken.says || isDue) setSpoken({ words, says, atS: nowS });
  return spoken.words;
}

function guardWords(facts: GuardFacts): string {
  const { view, nowS } = facts;
  if (view.says === 'quiet') return '';
  if (view.says === 'watch') return `Watch. ${watchSentence(facts)}`;
  const { head, todo } = haltWords(facts);
  const likelyS = view.says === 'cut-heat' ? view.forecast?.highLimit?.likelyS : null;
  const left = likelyS == null || likelyS <= nowS ? '' : ` ${formatSpan(likelyS - nowS)} left.`;
  return `${head}.${left} ${todo}`;
}
