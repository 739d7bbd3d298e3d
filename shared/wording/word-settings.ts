import type { SettingsPair } from '../analysis/compare/compare-settings.ts';
import type { About, Cause } from './finding-words.ts';
import { formatStep } from './format.ts';
import { figureRows, type WordedPair } from './pair-words.ts';

/** What the words depend on. `control` other than thermistor counts as a thermostat. */
export type AboutSettings = Pick<About, 'unit'> & {
  control: string;
  hotter: string;
  cooler: string;
};

/** Runs on two heat settings side by side, in words for a technician. Causes in trade order, common practice. */
export function wordSettings(pair: SettingsPair, about: AboutSettings): WordedPair {
  const isFaulty = pair.verdict !== 'as-it-should' && pair.verdict !== 'cannot-tell';
  return {
    title: TITLES[pair.verdict],
    sentences: sentencesOf(pair, about),
    rows: figureRows(pair.differences, about.unit),
    causes: isFaulty ? causesOf(pair, about) : [],
    nextChecks: isFaulty ? checksOf(about) : openChecks(pair),
  };
}

const TITLES: Record<SettingsPair['verdict'], string> = {
  'as-it-should': 'The settings differ as they should',
  'no-difference': 'The setting makes no difference',
  'not-enough': 'The setting makes too little difference',
  backwards: 'The settings work backwards',
  'cannot-tell': 'The two settings cannot be told apart yet',
};

function sentencesOf(pair: SettingsPair, { unit, hotter, cooler }: AboutSettings): string[] {
  const expected = formatStep(pair.expectedK, unit);
  const should =
    pair.expectedFrom === 'ratings'
      ? `By the machine’s own ratings it is to be ${expected} lower.`
      : `A bias heater lowers it by about ${expected} (common practice; the service sheet outranks this).`;
  if (pair.why === 'limit-cuts') {
    return [
      'A limit cuts before the thermostat does, so the setting cannot be seen. Put the air right first.',
    ];
  }
  if (pair.lowerByK === null || pair.lowerByWithinK === null) {
    return ['One of the runs has too few cut-outs to compare.', should];
  }
  const size = formatStep(Math.abs(pair.lowerByK), unit);
  const within = formatStep(pair.lowerByWithinK, unit);
  const way = pair.lowerByK < 0 ? 'higher' : 'lower';
  return [
    `On ${cooler} the heat cuts out ${size} ${way} than on ${hotter}, give or take ${within}.`,
    should,
  ];
}

function causesOf({ verdict }: SettingsPair, { control, hotter, cooler }: AboutSettings): Cause[] {
  if (control === 'thermistor') return boardCauses();
  const swapped: Cause = {
    cause: 'Wires of the bias heater swapped',
    why: `Fed on ${hotter} and not on ${cooler} it works backwards.`,
    settles: 'Bias volts on each setting, by a qualified person.',
  };
  const open: Cause = {
    cause: 'Bias heater open, or not fed',
    why: `Without it ${cooler} behaves as ${hotter}.`,
    settles: 'Its ohms with the power off; its volts on each setting, by a qualified person.',
  };
  const selector: Cause = {
    cause: 'Selector switch',
    why: 'It passes the same feed on both settings.',
    settles: 'Continuity through it on each setting, plug out.',
  };
  const type: Cause = {
    cause: 'Thermostat of another type fitted',
    why: 'One without a bias heater has a single cut-out.',
    settles: 'The mark, and the number of its terminals, against the service sheet.',
  };
  return verdict === 'backwards' ? [swapped, selector, type] : [open, selector, swapped, type];
}

function boardCauses(): Cause[] {
  return [
    {
      cause: 'Selector or its input on the board',
      why: 'The board sets one turn-off point for both settings.',
      settles: 'What the board shows of the setting in its own test, as the service sheet says.',
    },
    {
      cause: 'Thermistor off its curve',
      why: 'It shifts all settings alike, and seldom makes them the same.',
      settles: 'Its resistance at a known temperature against the service sheet.',
    },
  ];
}

function checksOf({ control, hotter, cooler }: AboutSettings): string[] {
  if (control === 'thermistor') {
    return ['The board’s own test of the selector', 'Thermistor resistance at a known temperature'];
  }
  return [
    'Bias heater ohms, plug out: several kilohms are usual (2,400 ± 240 on one make)',
    `Bias volts: some on ${cooler}, none on ${hotter}`,
    'Selector switch on each setting',
    'Read the mark on the thermostat against the service sheet',
  ];
}

function openChecks({ verdict, why }: SettingsPair): string[] {
  if (why === 'limit-cuts') return ['The checks of the finding on the limit'];
  return verdict === 'cannot-tell'
    ? ['Both settings again, through at least three cycles each']
    : [];
}
