import type { SwitchInstant } from '../run-facts.ts';
import type { LocatedTurn } from './locate-turns.ts';

/**
 * One turn as several fits read it, each with its probability: the mean, and an uncertainty that holds both each fit's
 * own and how far they lie apart (variance of a mixture, k = 2).
 *
 * @param readings shares sum to 1; null where a fit reads nothing
 * @returns null where none reads anything
 */
export function mixed(readings: { turn: LocatedTurn | null; share: number }[]): LocatedTurn | null {
  const turns: LocatedTurn[] = [];
  const shares: number[] = [];
  for (const { turn, share } of readings) {
    if (!turn) continue;
    turns.push(turn);
    shares.push(share);
  }
  if (turns.length === 0) return null;
  const { mean: tempC, u: uK } = mixture(
    shares,
    turns.map((turn) => turn.tempC),
    turns.map((turn) => turn.uK),
  );
  const timeS = meanOf(
    shares,
    turns.map((turn) => turn.timeS),
  );
  return { timeS, tempC, uK, switched: mixedSwitch(turns, shares) };
}

/** Null unless all show it. */
function mixedSwitch(turns: LocatedTurn[], shares: number[]): SwitchInstant | null {
  const switches = turns.map(({ switched }) => switched).filter((switched) => switched !== null);
  if (switches.length < turns.length) return null;
  const time = mixture(
    shares,
    switches.map((switched) => switched.timeS),
    switches.map((switched) => switched.uS),
  );
  const temp = mixture(
    shares,
    switches.map((switched) => switched.tempC),
    switches.map((switched) => switched.uK),
  );
  return { timeS: time.mean, uS: time.u, tempC: temp.mean, uK: temp.u };
}

function meanOf(shares: number[], values: number[]): number {
  const all = shares.reduce((sum, share) => sum + share, 0);
  return values.reduce((sum, value, i) => sum + (shares[i]! / all) * value, 0);
}

function mixture(shares: number[], values: number[], us: number[]): { mean: number; u: number } {
  const mean = meanOf(shares, values);
  const square = meanOf(
    shares,
    values.map((value, i) => us[i]! ** 2 + 4 * (value - mean) ** 2),
  );
  return { mean, u: Math.sqrt(square) };
}
