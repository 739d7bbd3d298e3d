import type { DuctPair, DuctSign } from '../analysis/compare/compare-duct-pair.ts';
import { isGas, type About, type Cause } from './finding-words.ts';
import { formatMoment, formatSpan } from './format.ts';
import { figureRows, type WordedPair } from './pair-words.ts';

/**
 * A run with the duct off beside one with it on, in words for a technician. Causes and checks in trade order, common
 * practice.
 */
export function wordDuctPair(pair: DuctPair, about: Pick<About, 'unit' | 'fuel'>): WordedPair {
  const gas = isGas(about);
  return {
    title: titleOf(pair),
    sentences: sentencesOf(pair),
    rows: [...figureRows(pair.differences, about.unit), ...firstCutOutRow(pair)],
    causes: causesOf(pair, gas),
    nextChecks: checksOf(pair, gas),
  };
}

function titleOf({ verdict, sharedFault }: DuctPair): string {
  if (verdict === 'house-duct') return 'Normal with the duct off, not with it on';
  if (verdict === 'cannot-tell') return 'The two runs do not settle it';
  return sharedFault ? 'The same fault both ways' : 'The same both ways';
}

const SIGNS: Record<DuctSign, string> = {
  'limit-bursts': 'With the duct on the heat is cut in bursts, well before the thermostat’s band.',
  'runs-hot': 'With the duct on the exhaust runs hotter.',
  'more-overshoot': 'With the duct on the air runs further ahead of the thermostat.',
  'short-heats': 'With the duct on each heat is shorter.',
};

const WHYS: Record<NonNullable<DuctPair['why']>, string> = {
  'few-cycles': 'One of them has too few cycles to compare. Run each through at least three.',
  'near-the-limit':
    'They differ, but by no more than a few cycles differ anyway. Run each through more cycles, with the same probe in the same place.',
  'other-way':
    'With the duct on the exhaust is cooler or heats longer. A restricted duct can do that where air leaks past the drum; a probe that moved can too.',
  'odd-without-duct':
    'The duct-off run has a fault that the other one does not show, so it is no measure for the duct.',
};

function sentencesOf({ verdict, signs, why, sharedFault }: DuctPair): string[] {
  if (verdict === 'house-duct') {
    return [
      ...signs.map((sign) => SIGNS[sign]),
      'That is consistent with a restricted house duct: the machine by itself behaves.',
    ];
  }
  if (why) return [WHYS[why]];
  return sharedFault
    ? [
        'Taking the duct off changed nothing. That is consistent with the machine’s own airflow or controls, and not with the house duct.',
      ]
    : ['The house duct makes no difference that these runs could show.'];
}

function firstCutOutRow({ firstCutOutS }: DuctPair): WordedPair['rows'] {
  if (!firstCutOutS) return [];
  const { off, on } = firstCutOutS;
  const apart = `${on < off ? '−' : '+'}${formatSpan(Math.abs(on - off))}`;
  return [{ label: 'First cut-out at', first: formatMoment(off), second: formatMoment(on), apart }];
}

function causesOf({ verdict, sharedFault }: DuctPair, gas: boolean): Cause[] {
  if (verdict === 'house-duct') return ductCauses();
  if (sharedFault !== 'limit-cycling') return [];
  return ownAirCauses(gas);
}

function ductCauses(): Cause[] {
  return [
    {
      cause: 'Duct crushed, kinked or full of lint',
      why: 'The machine behaves once its air can leave.',
      settles: 'Back pressure at the outlet, duct on, heat off: over 0.75 in. w.c. is too much.',
    },
    {
      cause: 'Hood flap stuck, or a screen in the air',
      why: 'The far end holds back what the duct would pass.',
      settles: 'Air speed at the hood, and the flap by eye.',
    },
    {
      cause: 'Duct too long, or with too many elbows',
      why: 'Length and elbows add up to the same back pressure.',
      settles: 'The sum of length and elbows against the maker’s table and the local code.',
    },
  ];
}

function ownAirCauses(gas: boolean): Cause[] {
  return [
    {
      cause: 'Lint in the chute, the screen or the cabinet',
      why: 'It holds the air back before the duct begins.',
      settles: 'Look, and vacuum; then the same run again.',
    },
    {
      cause: 'Blower wheel stripped, cracked or blocked',
      why: 'Little air leaves even with nothing behind it.',
      settles: 'Air at the open outlet; the wheel must not turn on its shaft. Plug out.',
    },
    {
      cause: 'Drum seal or screen missing',
      why: `Cold air passes the drum, so that the ${gas ? 'burner' : 'heater'} runs hot while the exhaust is cool.`,
      settles: 'Felt, door seal and screen by eye; lint trails show the leak.',
    },
    {
      cause: `Limit on the ${gas ? 'burner funnel' : 'heater housing'} weak`,
      why: 'Much work wears it out, so that it opens early.',
      settles: 'A heated bench check against its mark, once the air is right.',
    },
  ];
}

function checksOf({ verdict, why, sharedFault }: DuctPair, gas: boolean): string[] {
  if (verdict === 'house-duct') {
    return [
      'Back pressure with the duct on and the heat off',
      'Air speed and flap at the hood',
      'Length and elbows of the duct',
      ...(gas
        ? ['Gas: the duct connected outdoors before any more heat; carbon monoxide in the room']
        : []),
      'After the duct is put right: the duct-on run again',
    ];
  }
  if (sharedFault === 'limit-cycling') {
    return [
      'Lint screen, chute and cabinet',
      'Blower wheel',
      'Drum and door seals',
      'The same run again',
    ];
  }
  if (why) return ['Both runs again: same probe, same place, same setting, empty'];
  return sharedFault ? ['The checks of the finding itself, on the machine'] : [];
}
