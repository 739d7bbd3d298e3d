/** The turns so far: what this machine did by itself is the best guess at what it does next. Plain data. */
export type TurnTrack = {
  climbing: boolean | null;
  highestC: number;
  lowestC: number;
  lowestAtS: number;
  /** When the leg of now began, s. */
  legFromS: number;
  /** Highest cut-out that the machine made by itself; null = none yet. */
  cutOutC: number | null;
};

/** A turn stands out by this, K: the swing threshold of the analysis, 4 °F. */
const SWING_K = 4 / 1.8;

export function startTurns(timeS: number, tempC: number): TurnTrack {
  return {
    climbing: null,
    highestC: tempC,
    lowestC: tempC,
    lowestAtS: timeS,
    legFromS: timeS,
    cutOutC: null,
  };
}

/**
 * Takes the estimate of now in, in place.
 *
 * @param byItself false where a person turned the heat, so that a peak says nothing of the machine
 * @returns whether a turn was seen
 */
export function followTurns(
  turns: TurnTrack,
  now: { timeS: number; tempC: number },
  byItself: boolean,
): boolean {
  const { timeS, tempC } = now;
  if (tempC > turns.highestC) turns.highestC = tempC;
  if (tempC < turns.lowestC) {
    turns.lowestC = tempC;
    turns.lowestAtS = timeS;
  }
  if (turns.climbing !== false && turns.highestC - tempC > SWING_K) {
    if (turns.climbing && byItself) {
      turns.cutOutC = Math.max(turns.cutOutC ?? -Infinity, turns.highestC);
    }
    turns.climbing = false;
    turns.lowestC = tempC;
    turns.lowestAtS = timeS;
    turns.legFromS = timeS;
    return true;
  }
  if (turns.climbing !== true && tempC - turns.lowestC > SWING_K) {
    turns.climbing = true;
    turns.highestC = tempC;
    turns.legFromS = turns.lowestAtS;
    return true;
  }
  return false;
}
