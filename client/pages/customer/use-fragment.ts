import { useSyncExternalStore } from 'react';

function watchFragment(onChange: () => void): () => void {
  window.addEventListener('hashchange', onChange);
  return () => window.removeEventListener('hashchange', onChange);
}

/** What stands after the # of the address: the browser keeps it to itself. */
export function useFragment(): string {
  return useSyncExternalStore(watchFragment, () => window.location.hash.slice(1));
}
