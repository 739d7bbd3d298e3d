import type { FindingCode } from '#shared/analysis/analysis.ts';
import { matchTurns, type FoundTurn } from './match-turns.ts';
import type { SeenRun } from './see-run.ts';
import type { Tally } from './tally.ts';
import { UNNAMED, type TrueCodes } from './truth/true-codes.ts';

/** Counts the turns that were found, missed and invented, and how far off they are. */
export function addTurns(tally: Tally, found: FoundTurn[], seen: SeenRun): void {
  const { pairs, hits, missed, invented } = matchTurns(
    found,
    seen.needed,
    seen.accepted,
    seen.method.withinS,
  );
  tally.hits += hits;
  tally.missed += missed;
  tally.invented += invented;
  for (const { truth, point, needed } of pairs) {
    if (!needed) continue;
    const errorF = Math.abs(point.tempC - truth.tempC) * 1.8;
    tally.tempErrorsF.push(errorF);
    tally.timeErrorsS.push(Math.abs(point.timeS - truth.timeS));
    if (point.uK !== undefined) {
      tally.uF.push(point.uK * 1.8);
      if (errorF <= point.uK * 1.8) tally.coveredTemps++;
    }
    if (typeof point.switchTimeS !== 'number' || typeof point.switchUS !== 'number') continue;
    const offS = Math.abs(point.switchTimeS - truth.switchTimeS);
    tally.switchErrorsS.push(offS);
    tally.switchUS.push(point.switchUS);
    if (offS <= point.switchUS) tally.coveredSwitches++;
  }
}

/** Counts whether the codes found are right. */
export function addCodes(tally: Tally, found: FindingCode[], truth: TrueCodes): void {
  const headline = found[0]!;
  tally.runs++;
  if (truth.headlines.includes(headline)) tally.rightHeadline++;
  if (isRightSet(found, truth)) tally.rightSet++;
  if (truth.faulty && headline === 'in-band') tally.falselyInBand++;
  if (truth.sound && !UNNAMED.includes(headline)) tally.falseAlarms++;
  const mayRunAway = [...truth.expected, ...truth.allowed].includes('runaway');
  if (found.includes('runaway') && !mayRunAway) tally.criedRunaways++;
  if (!found.includes('runaway') && truth.expected.includes('runaway')) tally.missedRunaways++;
}

/** All that is expected, and nothing that is neither expected nor allowed. */
export function isRightSet(found: FindingCode[], { expected, allowed }: TrueCodes): boolean {
  return (
    expected.every((code) => found.includes(code)) &&
    found.every((code) => expected.includes(code) || allowed.includes(code))
  );
}
