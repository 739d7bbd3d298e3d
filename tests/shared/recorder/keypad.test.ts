import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { expectReading, plausibleSpan, type Expected } from '#shared/recorder/expect-reading.ts';
import {
  candidatesOf,
  emptyTyping,
  typeDigit,
  wheelsOf,
  type KeypadAnswer,
  type KeypadSetup,
} from '#shared/recorder/keypad.ts';

const WHOLE_F: KeypadSetup = { unit: 'F', hasTenths: false };
const TENTHS_C: KeypadSetup = { unit: 'C', hasTenths: true };

/** 8 s after a reading of 137 °F on a slow rise. */
const NEAR_137: Expected = { temp: 138, gapS: 8, slopePerS: 0.12 };

function type(digits: string, expected: Expected | null, setup = WHOLE_F): KeypadAnswer {
  let answer: KeypadAnswer = { does: 'go-on', typing: emptyTyping(expected) };
  Array.from(digits).forEach((digit, i) => {
    if (answer.does !== 'go-on') throw new Error(`kept before ${digit}`);
    answer = typeDigit(answer.typing, digit, 100 + i, expected, setup);
  });
  return answer;
}

const asks = (answer: KeypadAnswer) => (answer.does === 'keep' ? 'kept' : answer.typing.asks);

describe('two taps', () => {
  test('take the hundreds from what is near, and the time of the first tap', () => {
    expect(type('41', NEAR_137)).toEqual({ does: 'keep', temp: 141, atS: 100 });
  });

  test('cross a hundred in either direction', () => {
    expect(type('02', { temp: 98, gapS: 8, slopePerS: 0.3 })).toMatchObject({ temp: 102 });
    expect(type('97', { temp: 101, gapS: 8, slopePerS: -0.3 })).toMatchObject({ temp: 97 });
  });

  test('become three once nobody looked for more than 45 s', () => {
    expect(emptyTyping({ temp: 155, gapS: 45, slopePerS: 0 }).asks).toBe('last');
    expect(emptyTyping({ temp: 155, gapS: 45.1, slopePerS: 0 }).asks).toBe('all');
    expect(type('161', { temp: 155, gapS: 60, slopePerS: 0 })).toMatchObject({ temp: 161 });
  });

  test('are asked about where they mean more than 25 °F off, and the same figure again keeps them', () => {
    const near142: Expected = { temp: 142, gapS: 8, slopePerS: 0.3 };

    expect(asks(type('72', near142))).toBe('sure');
    expect(type('722', near142)).toEqual({ does: 'keep', temp: 172, atS: 100 });
  });

  test('begin anew with another figure, at its own moment', () => {
    expect(type('7243', { temp: 142, gapS: 8, slopePerS: 0.3 })).toEqual({
      does: 'keep',
      temp: 143,
      atS: 102,
    });
  });

  test('ask for the hundreds where 92 and 192 are as far off as each other', () => {
    expect(asks(type('92', { temp: 142, gapS: 8, slopePerS: 0.3 }))).toBe('hundreds');
  });

  test('ask for the hundreds on a fast trace after a long gap', () => {
    const fast: Expected = { temp: 150, gapS: 40, slopePerS: -2 };

    expect(asks(type('90', fast))).toBe('hundreds');
    expect(type('900', fast)).toEqual({ does: 'keep', temp: 90, atS: 100 });
    expect(type('901', fast)).toEqual({ does: 'keep', temp: 190, atS: 100 });
  });

  test('doubt a hundred that no exhaust reaches', () => {
    expect(asks(type('909', { temp: 150, gapS: 40, slopePerS: -2 }))).toBe('sure');
  });
});

describe('the first reading', () => {
  test('takes all figures, a 0 first under 100', () => {
    expect(emptyTyping(null).asks).toBe('all');
    expect(type('072', null)).toEqual({ does: 'keep', temp: 72, atS: 100 });
  });

  test('is asked about where no exhaust begins', () => {
    expect(asks(type('720', null))).toBe('sure');
  });
});

describe('tenths and °C', () => {
  test('take one tap more', () => {
    expect(type('543', { temp: 53.9, gapS: 8, slopePerS: 0.1 }, TENTHS_C)).toEqual({
      does: 'keep',
      temp: 54.3,
      atS: 100,
    });
    expect(type('0214', null, TENTHS_C)).toMatchObject({ temp: 21.4 });
  });

  test('near zero a value and its opposite are both plausible, so the keypad asks', () => {
    expect(asks(type('030', { temp: 1, gapS: 8, slopePerS: 0 }, TENTHS_C))).toBe('hundreds');
  });
});

describe('the wheels', () => {
  const figures = (digits: string, expected: Expected | null, setup = WHOLE_F) => {
    const answer = type(digits, expected, setup);
    if (answer.does !== 'go-on') throw new Error('kept');
    return wheelsOf(answer.typing, expected, setup).map(({ figure, look }) => `${look}${figure}`);
  };

  test('show the guessed hundred printed, then the figures typed, then where the next goes', () => {
    expect(figures('', NEAR_137)).toEqual(['guess1', 'next', 'open']);
    expect(figures('4', NEAR_137)).toEqual(['guess1', 'typed4', 'next']);
  });

  test('guess nothing where all figures are typed', () => {
    expect(figures('1', { temp: 155, gapS: 60, slopePerS: 0 })).toEqual(['typed1', 'next', 'open']);
  });

  test('wait at the hundreds where these are asked for', () => {
    expect(figures('90', { temp: 150, gapS: 40, slopePerS: -2 })).toEqual([
      'next',
      'typed9',
      'typed0',
    ]);
  });

  test('carry a point before the tenths', () => {
    expect(figures('54', { temp: 53.9, gapS: 8, slopePerS: 0 }, TENTHS_C)).toEqual([
      'guess',
      'typed5',
      'typed4',
      'point.',
      'next',
    ]);
  });
});

const anExpected = fc.option(
  fc.record({
    temp: fc.double({ min: -40, max: 320, noNaN: true }),
    gapS: fc.double({ min: 0.2, max: 120, noNaN: true }),
    slopePerS: fc.double({ min: -4, max: 4, noNaN: true }),
  }),
);
const aSetup = fc.record({
  unit: fc.constantFrom('F' as const, 'C' as const),
  hasTenths: fc.boolean(),
});
const someDigits = fc.array(fc.constantFrom(...'0123456789'), { minLength: 1, maxLength: 8 });

/** Types until something is kept; what was typed of it is given back. */
function typeUntilKept(digits: string[], expected: Expected | null, setup: KeypadSetup) {
  let typing = emptyTyping(expected);
  for (const [i, digit] of digits.entries()) {
    const answer = typeDigit(typing, digit, 100 + i, expected, setup);
    if (answer.does === 'keep') return { kept: answer, typing, digit };
    typing = answer.typing;
  }
  return null;
}

describe('whatever is typed', () => {
  test('a kept value ends in the figures that were typed', () => {
    fc.assert(
      fc.property(someDigits, anExpected, aSetup, (digits, expected, setup) => {
        const outcome = typeUntilKept(digits, expected, setup);
        if (!outcome) return;
        const { kept, typing, digit } = outcome;
        const typed =
          typing.asks === 'sure'
            ? typing.digits
            : typing.asks === 'hundreds'
              ? digit + typing.digits
              : typing.digits + digit;
        const shown = Math.abs(kept.temp).toFixed(setup.hasTenths ? 1 : 0);
        expect(shown.replace('.', '').padStart(typed.length, '0').slice(-typed.length)).toBe(typed);
      }),
      { numRuns: 2000 },
    );
  });

  test('nothing is kept in silence where two values lie within the plausible span', () => {
    fc.assert(
      fc.property(fc.tuple(fc.nat(9), fc.nat(9)), anExpected, ([a, b], expected) => {
        fc.pre(expected !== null && expected.gapS <= 45);
        if (!expected) return;
        const outcome = typeUntilKept([`${a}`, `${b}`], expected, WHOLE_F);
        const { low, high } = plausibleSpan(expected, 'F');
        const plausible = candidatesOf(`${a}${b}`, WHOLE_F).filter((t) => t >= low && t <= high);
        if (outcome) expect(plausible.length).toBeLessThanOrEqual(1);
        if (outcome) expect(Math.abs(outcome.kept.temp - expected.temp)).toBeLessThanOrEqual(25);
      }),
      { numRuns: 2000 },
    );
  });

  test('the stamp is that of the first tap of the reading that is kept', () => {
    fc.assert(
      fc.property(someDigits, anExpected, aSetup, (digits, expected, setup) => {
        const outcome = typeUntilKept(digits, expected, setup);
        if (outcome) expect(outcome.kept.atS).toBe(outcome.typing.atS ?? 100);
      }),
    );
  });
});

describe('expectReading', () => {
  test('follows the slope of two near readings for a while only', () => {
    const last = { atS: 20, temp: 140 };
    const before = { atS: 10, temp: 137 };

    expect(expectReading(last, before, 30)).toEqual({ temp: 143, gapS: 10, slopePerS: 0.3 });
    expect(expectReading(last, before, 120)?.temp).toBeCloseTo(144.5, 9);
  });

  test('knows nothing before the first, and no slope from one', () => {
    expect(expectReading(null, null, 5)).toBeNull();
    expect(expectReading({ atS: 20, temp: 140 }, null, 30)?.slopePerS).toBe(0);
  });
});
