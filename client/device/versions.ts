import { useSyncExternalStore } from 'react';
import { isRecording } from './recording-hold.ts';
import { SERVICE_WORKER_URL, trustedWorkerUrl } from './trusted-worker.ts';

const HOUR_MS = 3_600_000;

/** A version that waits for its turn; null: this is the newest. */
let waiting: ServiceWorker | null = null;
const listeners = new Set<() => void>();

function show(next: ServiceWorker | null): void {
  waiting = next;
  for (const tell of listeners) tell();
}

/** Registers what opens the application without a server, and looks for newer versions of it. */
export function watchVersions(): void {
  if (!import.meta.env.PROD || !('serviceWorker' in navigator)) return;
  const { serviceWorker } = navigator;
  let hadVersion = serviceWorker.controller !== null;
  serviceWorker.addEventListener('controllerchange', () => {
    // The very first version takes over a page that is its own already.
    if (hadVersion) window.location.reload();
    hadVersion = true;
  });
  void serviceWorker.register(trustedWorkerUrl(SERVICE_WORKER_URL)).then((registration) => {
    if (registration.waiting && serviceWorker.controller) show(registration.waiting);
    registration.addEventListener('updatefound', () => follow(registration));
    setInterval(() => void registration.update().catch(() => {}), HOUR_MS);
  });
}

function follow({ installing }: ServiceWorkerRegistration): void {
  installing?.addEventListener('statechange', () => {
    if (installing.state === 'installed' && navigator.serviceWorker.controller) show(installing);
    if (installing.state === 'redundant' && waiting === installing) show(null);
  });
}

function subscribe(tell: () => void): () => void {
  listeners.add(tell);
  return () => void listeners.delete(tell);
}

/** A newer version lies ready and waits. */
export function useNewVersion(): boolean {
  return useSyncExternalStore(subscribe, () => waiting !== null);
}

/** Every tab opens anew with the new version, unless a run is being recorded in one. */
export async function takeNewVersion(): Promise<'taken' | 'recording'> {
  if (await isRecording()) return 'recording';
  waiting?.postMessage({ type: 'SKIP_WAITING' });
  return 'taken';
}
