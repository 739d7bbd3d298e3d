import type { GuardFacts } from './guard-panel.tsx';
import { watchSentence } from './guard-panel.tsx';
import { haltWords } from './halt-panel.tsx';

/** What a screen reader says: what was kept, in its turn; what the guard wants, at once. */
export function Announcer({ said, facts }: { said: string; facts: GuardFacts }) {
  const { says } = facts.view;
  const { head, todo } = haltWords(facts);
  return (
    <>
      <p role="status" className="sr-only">
        {said}
      </p>
      <p role="alert" className="sr-only" key={says}>
        {says === 'watch' &&
          `Watch. ${watchSentence({ ...facts, nowS: Math.floor(facts.nowS / 15) * 15 })}`}
        {(says === 'cut-heat' || says === 'unplug') && `${head}. ${todo}`}
      </p>
    </>
  );
}
