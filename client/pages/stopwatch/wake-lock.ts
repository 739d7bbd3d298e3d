/** Keeps the screen on while a run goes on; taken again whenever the page comes back into view. */
export function holdScreen(onReleased: () => void): () => void {
  let sentinel: WakeLockSentinel | null = null;
  let isOver = false;

  async function take(): Promise<void> {
    if (isOver || document.visibilityState !== 'visible' || !('wakeLock' in navigator)) return;
    try {
      const taken = await navigator.wakeLock.request('screen');
      sentinel = taken;
      taken.addEventListener('release', onReleased);
      if (isOver) await taken.release();
    } catch {
      // Refused, as on a low battery: the run goes on without it.
    }
  }

  const handleVisibility = () => void take();
  document.addEventListener('visibilitychange', handleVisibility);
  void take();
  return () => {
    isOver = true;
    document.removeEventListener('visibilitychange', handleVisibility);
    void sentinel?.release();
  };
}
