/** Sounds made on the spot; the browser lets them out after the first press. */
export function createSounds() {
  let audio: AudioContext | null = null;

  function context(): AudioContext | null {
    if (typeof AudioContext === 'undefined') return null;
    if (!navigator.userActivation?.hasBeenActive) return audio;
    audio ??= new AudioContext();
    if (audio.state === 'suspended') void audio.resume();
    return audio;
  }

  /** @param startS from now */
  function tone(hz: number, startS: number, lengthS: number, loudness: number): void {
    const at = context();
    if (!at) return;
    const wave = at.createOscillator();
    const gain = at.createGain();
    const from = at.currentTime + startS;
    wave.type = 'square';
    wave.frequency.value = hz;
    // A few ms of slope at both ends: a bare edge clicks.
    gain.gain.setValueAtTime(0, from);
    gain.gain.linearRampToValueAtTime(loudness, from + 0.004);
    gain.gain.setValueAtTime(loudness, from + Math.max(0.005, lengthS - 0.004));
    gain.gain.linearRampToValueAtTime(0, from + lengthS);
    wave.connect(gain).connect(at.destination);
    wave.start(from);
    wave.stop(from + lengthS);
  }

  return {
    /** Called in a press, so that later sounds are let out. */
    wake: () => void context(),
    beat: () => tone(1200, 0, 0.015, 0.15),
    kept: () => tone(1800, 0, 0.02, 0.2),
    watch() {
      tone(1500, 0, 0.12, 0.5);
      tone(1500, 0.2, 0.12, 0.5);
    },
    /** Half a second of it; called again and again until it is over. */
    cutHeat() {
      tone(2600, 0, 0.25, 1);
      tone(2000, 0.25, 0.25, 1);
    },
  };
}

export type Sounds = ReturnType<typeof createSounds>;

export const VIBRATIONS = {
  beat: [10],
  kept: [15],
  watch: [200, 100, 200],
  cutHeat: [600, 150],
} as const;

/** Where the device can, and once the page was touched; elsewhere nothing. */
export function vibrate(pattern: readonly number[]): void {
  if (!('vibrate' in navigator) || !navigator.userActivation?.hasBeenActive) return;
  navigator.vibrate([...pattern]);
}
