import { describe, expect, test } from 'vitest';
import { toCelsius } from '#shared/units.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { over } from '#tests/bench/accuracy/truth/how.ts';
import { thermostatSigns } from '#tests/bench/accuracy/truth/thermostat-signs.ts';
import type { TruePoint, TruePoints } from '#tests/bench/accuracy/truth/true-points.ts';
import { unnamedCodes } from '#tests/bench/accuracy/truth/unnamed-codes.ts';

/** Points at °F, judged: 155 ± 5 and 130 ± 5, 10 allowed beyond; switches as given under them. */
function points(cutOutsF: number[], resetsF: number[], told: Partial<TruePoints> = {}): TruePoints {
  const at =
    (switchBelowK: number) =>
    (tempF: number, i: number): TruePoint => ({
      timeS: 100 * i,
      tempC: toCelsius(tempF, 'F'),
      switchTempC: toCelsius(tempF, 'F') - switchBelowK,
    });
  const cutOuts = cutOutsF.map(at(0.5));
  // A probe of ±2 °F: expanded 2·2/√3 = 2.31 °F.
  const uK = { pointUK: 0.12 / 1.8, probeUK: 2.31 / 1.8 };
  return { allCutOuts: cutOuts, cutOuts, resets: resetsF.map(at(-0.5)), ...uK, ...told };
}

function howOf(code: string, of: TruePoints): string | undefined {
  return thermostatSigns(of, DEFAULT_RATING).find((sign) => sign.code === code)?.how;
}

const four = (tempF: number) => [tempF, tempF + 0.2, tempF - 0.2, tempF];

test('what clears a limit by more than the slack is certain, within it possible, under it not', () => {
  expect([over(2, 1), over(0.5, 1), over(-0.5, 1), over(-2, 1)]).toEqual([
    'certain',
    'possible',
    'possible',
    'no',
  ]);
});

describe('opens-high for a band that ends, allowance included, at 170 °F, with a probe known to 2.31 °F', () => {
  test.each([
    [174, 'certain'],
    // 170 + 2.31: on the very limit.
    [172.3, 'possible'],
    [171, 'no'],
    [165, 'no'],
  ])('cut-outs at %s °F: %s', (tempF, how) => {
    expect(howOf('opens-high', points(four(tempF), four(130)))).toBe(how);
  });

  test('with a perfect probe 171 °F is outside', () => {
    expect(howOf('opens-high', points(four(171), four(130), { probeUK: 0 }))).toBe('certain');
  });
});

test('a low cut-out has no allowance, a low reset has', () => {
  expect(howOf('opens-low', points(four(146), four(130)))).toBe('certain');
  expect(howOf('closes-low', points(four(155), four(118)))).toBe('no');
  expect(howOf('closes-low', points(four(155), four(111)))).toBe('certain');
  expect(howOf('closes-high', points(four(155), four(139)))).toBe('certain');
});

test('four cut-outs that climb by more than the tolerance along a line drift; three do not', () => {
  expect(howOf('drifting', points([151, 153.1, 154.9, 157, 159.1], four(130)))).toBe('certain');
  expect(howOf('drifting', points([151, 155, 159], four(130)))).toBe('no');
  expect(howOf('drifting', points([154, 154.5, 155, 155.5], four(130)))).toBe('no');
});

test('cut-outs that vary by more than 4 °F about their line are scattered', () => {
  // Residuals ±6 about a level line over six points: s = √(6·36/4) = 7.3 °F.
  expect(howOf('scattered', points([161, 149, 161, 149, 149, 161], four(130)))).toBe('certain');
  expect(howOf('scattered', points([156, 154, 156, 154, 154, 156], four(130)))).toBe('no');
});

test('where nothing has a name, the points decide between mixed, too-close and in-band', () => {
  const codesOf = (cutOutsF: number[], resetsF: number[]) =>
    unnamedCodes(points(cutOutsF, resetsF), DEFAULT_RATING);

  expect(codesOf(four(155), four(130))).toEqual(['in-band']);
  // Wholly within the allowance.
  expect(codesOf(four(165), four(130))).toEqual(['too-close']);
  expect(codesOf([155, 155, 178, 155], four(130))).toEqual(['mixed']);
  // The mean on the band's edge.
  expect(codesOf(four(160), four(130))).toEqual(['too-close', 'in-band']);
  expect(codesOf([155], four(130))).toEqual(['too-short']);
});
