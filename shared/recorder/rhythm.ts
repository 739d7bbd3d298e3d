/** How often the recorder asks for a reading, s; null: never. */
export const RHYTHMS_S = [5, 10, 15, 20, 30] as const;
export type Rhythm = (typeof RHYTHMS_S)[number] | null;

/** Where a moment lies between two ticks. Ticks stand at whole multiples of the rhythm, whatever is read or left out. */
export type Beat = {
  /** Ticks passed so far. */
  ticks: number;
  /** Seconds to the next one. */
  toNextS: number;
};

export function beatAt(rhythm: NonNullable<Rhythm>, timeS: number): Beat {
  const ticks = Math.floor(timeS / rhythm + 1e-9);
  return { ticks, toNextS: Math.max(0, (ticks + 1) * rhythm - timeS) };
}

/** What was kept on the device as the chosen rhythm, if it is one. */
export function toRhythm(kept: unknown): Rhythm | undefined {
  if (kept === null) return null;
  return RHYTHMS_S.find((rhythm) => rhythm === kept);
}
