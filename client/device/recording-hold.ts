const LOCK = 'fusekeeper-recording';

/**
 * While a run is being recorded no new version of the application takes over, in whichever tab.
 * Held until the page goes, or until what this gives back is called.
 */
export function holdUpdates(): () => void {
  let release = () => {};
  const released = new Promise<void>((resolve) => (release = resolve));
  void navigator.locks?.request(LOCK, { mode: 'shared' }, () => released);
  return release;
}

export async function isRecording(): Promise<boolean> {
  const { held = [] } = (await navigator.locks?.query()) ?? {};
  return held.some(({ name }) => name === LOCK);
}
