import type { QueryClient } from '@tanstack/react-query';
import type { SendingsAnswer } from '#shared/schemas/sendings.ts';
import { askAgain } from './page-age.ts';
import { keepSending, onAnswers } from './this-device.ts';

const ASK_AGAIN_MS = 20_000;
/** What things of the device change on the server. */
const CHANGED_NOUNS = ['visits', 'rounds', 'runs', 'machines', 'jobs'];

/** Pages follow what the device learns: what was sent changes them, and a server that answers again is asked anew. */
export function joinQueries(queryClient: QueryClient): void {
  onAnswers((answer) => {
    if (hasChanged(answer)) refetchChanged(queryClient);
    askAgain(queryClient);
  });
  keepSending.subscribe(() => {
    const { isSending, outcome } = keepSending.sending();
    // Asks for the session, which asks to sign in, or finds that somebody else did.
    if (!isSending && outcome === 'signed-out') {
      void queryClient.invalidateQueries({ queryKey: ['session'] });
    }
  });
  setInterval(() => {
    if (document.visibilityState === 'visible') askAgain(queryClient);
  }, ASK_AGAIN_MS);
}

function hasChanged({ answers }: SendingsAnswer): boolean {
  return answers.some(({ status }) => status === 'applied' || status === 'already-applied');
}

function refetchChanged(queryClient: QueryClient): void {
  for (const noun of CHANGED_NOUNS) void queryClient.invalidateQueries({ queryKey: [noun] });
}
