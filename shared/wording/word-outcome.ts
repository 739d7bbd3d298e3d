import type { Finding, Outcome } from '../analysis/analysis.ts';
import { wordFinding } from './word-finding.ts';
import type { About } from './finding-words.ts';

/** The verdict of a run, and where it is *stop*, what to do in the next ten minutes, in order. */
export type WordedOutcome = { heading: string; sentence: string; afterStop: string[] };

/**
 * An outcome in words for a technician. The headline is the first finding.
 *
 * @param headline first finding of the analysis
 * @param about unit, rating and fuel, as for wordFinding
 */
export function wordOutcome(outcome: Outcome, headline: Finding, about: About): WordedOutcome {
  const heading = wordFinding(headline, about).title;
  if (outcome === 'proven') {
    return { heading, sentence: 'Proven by this run.', afterStop: [] };
  }
  if (outcome === 'not-proven') {
    return { heading, sentence: 'Not proven by this run.', afterStop: [] };
  }
  return {
    heading,
    sentence: 'Stop. Do not leave this machine heating.',
    afterStop: afterStop(about.fuel === 'gas'),
  };
}

function afterStop(gas: boolean): string[] {
  return [
    'Cut the heat: selector to no-heat or off. Leave the drum turning if you can, so that air moves.',
    'If the exhaust still climbs, pull the plug or open the breaker. A path to the frame does not obey the selector.',
    ...(gas
      ? [
          'Close the gas at its shut-off. On a smell of gas: touch no switch, air the room, get people out and call the gas emergency line.',
        ]
      : []),
    'Stay with the machine until the exhaust falls and goes on falling.',
    'On smoke or a burning smell: plug out if safe, people out, call the fire service.',
    'When it is cool, check the one-shot fuse and the thermal cut-off. They may have opened, or be weakened.',
    'Do not leave it usable: plug out, breaker open or gas closed, a tag on it, and tell the household why.',
  ];
}
