/** Where a handle on the strip goes when a key is pressed; null for keys that do not move it. */
export function moveHandle(
  key: string,
  timeS: number,
  bounds: { lowS: number; highS: number },
): number | null {
  const moves: Record<string, number> = {
    ArrowLeft: timeS - 1,
    ArrowDown: timeS - 1,
    ArrowRight: timeS + 1,
    ArrowUp: timeS + 1,
    PageDown: timeS - 60,
    PageUp: timeS + 60,
    Home: bounds.lowS,
    End: bounds.highS,
  };
  const moved = moves[key];
  return moved === undefined ? null : clampTime(moved, bounds);
}

/** Whole seconds inside the bounds; the bounds themselves keep their fraction. */
export function clampTime(timeS: number, { lowS, highS }: { lowS: number; highS: number }): number {
  return Math.min(Math.max(Math.round(timeS), lowS), highS);
}
