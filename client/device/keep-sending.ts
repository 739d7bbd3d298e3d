import type { Device } from './device.ts';
import type { Sender, SendOutcome } from './sender.ts';

const FIRST_RETRY_MS = 5_000;
const LAST_RETRY_MS = 300_000;

/** How the last attempt went; null: none yet. */
export type Sending = { isSending: boolean; outcome: SendOutcome | null };

export type KeepSending = ReturnType<typeof createKeepSending>;

/** When things are sent: on opening, on return to the page, when the line returns, when something was kept, by a timer. */
export function createKeepSending(device: Device, sender: Sender) {
  let failures = 0;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let sending: Sending = { isSending: false, outcome: null };
  const listeners = new Set<() => void>();

  function show(next: Sending): void {
    sending = next;
    for (const tell of listeners) tell();
  }

  async function attempt(): Promise<SendOutcome> {
    clearTimeout(timer);
    show({ ...sending, isSending: true });
    let outcome: SendOutcome = 'broken';
    try {
      outcome = await sender.send();
    } finally {
      show({ isSending: false, outcome });
      failures = outcome === 'sent' ? 0 : failures + 1;
      // Signing in sends again; a timer would only ask in vain.
      if (outcome !== 'sent' && outcome !== 'signed-out') {
        timer = setTimeout(attemptIfAny, retryMs(failures));
      }
    }
    return outcome;
  }

  function attemptIfAny(): void {
    if (device.unsent().unsent > 0) void attempt();
  }

  /** The person or the network gives a reason to hope. */
  function handleHope(): void {
    failures = 0;
    attemptIfAny();
  }

  function handleVisibility(): void {
    if (document.visibilityState === 'visible') handleHope();
  }

  /** Kept just now: sent at once, unless the line is known to be down. */
  function handleChange(): void {
    if (failures === 0 && !sending.isSending) attemptIfAny();
  }

  return {
    sendNow: attempt,
    /** Signed in, or the server answered something else: worth another try at once. */
    hope: handleHope,
    sending: () => sending,
    subscribe(tell: () => void): () => void {
      listeners.add(tell);
      return () => void listeners.delete(tell);
    },
    /** @returns stops it */
    start(): () => void {
      window.addEventListener('online', handleHope);
      window.addEventListener('pageshow', handleHope);
      document.addEventListener('visibilitychange', handleVisibility);
      const unsubscribe = device.subscribe(handleChange);
      handleHope();
      return () => {
        window.removeEventListener('online', handleHope);
        window.removeEventListener('pageshow', handleHope);
        document.removeEventListener('visibilitychange', handleVisibility);
        unsubscribe();
        clearTimeout(timer);
      };
    },
  };
}

/** 5 s, doubling to 5 min. */
export function retryMs(failures: number): number {
  return Math.min(FIRST_RETRY_MS * 2 ** (failures - 1), LAST_RETRY_MS);
}
