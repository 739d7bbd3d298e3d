import type { Cycle } from './analysis.ts';
import type { Extreme } from './run-facts.ts';

/**
 * Complete cycles: cut-out → reset → next cut-out, each turned by the machine. The first heat from cold belongs
 * to none.
 */
export function findCycles(extremes: Extreme[]): Cycle[] {
  const cycles: Cycle[] = [];
  for (let i = 0; i + 2 < extremes.length; i++) {
    const [cutOut, reset, next] = [extremes[i]!, extremes[i + 1]!, extremes[i + 2]!];
    if (cutOut.kind !== 'peak') continue;
    if ([cutOut, reset, next].some(({ turnedBy }) => turnedBy !== 'machine')) continue;
    cycles.push({
      offS: reset.timeS - cutOut.timeS,
      onS: next.timeS - reset.timeS,
      swingK: cutOut.tempC - reset.tempC,
    });
  }
  return cycles;
}
