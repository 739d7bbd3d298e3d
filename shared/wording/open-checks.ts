import type { About } from './finding-words.ts';

/** How the checks that ask for a run begin, and how the duct is in it. */
const ASKS_FOR_RUN = [
  { begins: 'The same run with the duct off', duct: 'off' },
  { begins: 'If it was run with the duct off', duct: 'on' },
] as const;

/** The checks without those for runs that were made already. */
export function openChecks(checks: string[], { ducts = [] }: About): string[] {
  return checks.filter(
    (check) =>
      !ASKS_FOR_RUN.some(({ begins, duct }) => check.startsWith(begins) && ducts.includes(duct)),
  );
}
