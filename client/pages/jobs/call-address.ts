import { useSearchParams } from 'react-router-dom';

const STEPS = ['customer', 'home', 'machine'] as const;
export type CallStep = (typeof STEPS)[number];

/** What is chosen so far stands in the address: a step back is a step back. */
export function useCallAddress() {
  const [search, setSearch] = useSearchParams();
  const chosen = Object.fromEntries(STEPS.map((step) => [step, search.get(step)])) as Record<
    CallStep,
    string | null
  >;
  function choose(step: CallStep, id: string) {
    setSearch(
      STEPS.slice(0, STEPS.indexOf(step) + 1).flatMap((name) => {
        const value = name === step ? id : chosen[name];
        return value === null ? [] : [[name, value] satisfies [string, string]];
      }),
    );
  }
  /** Back to a step: it and what follows are open again. */
  function reopen(step: CallStep) {
    const kept = STEPS.slice(0, STEPS.indexOf(step));
    setSearch(
      kept.flatMap((name) => {
        const value = chosen[name];
        return value === null ? [] : [[name, value] satisfies [string, string]];
      }),
    );
  }
  return { chosen, choose, reopen };
}
