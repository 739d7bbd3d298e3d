import { expect, test } from 'vitest';
import { CURVES, tabulateTurn } from '#shared/analysis/turns/turn-shape.ts';

test('the curves add up to two lags’ answer to legs that meet at the switch', () => {
  const constants = { tauBeforeS: 60, tauAfterS: 40, lagAS: 7, lagBS: 3 };
  const shape = tabulateTurn(constants, 80, 60);
  const [a0, a1, a2, b1, b2] = [70, 0.02, -12, -0.01, 15] as const;
  const exhaust = (s: number) =>
    s < 0 ? a0 + a1 * s + a2 * Math.exp(-s / 60) : a0 + a2 - b2 + b1 * s + b2 * Math.exp(-s / 40);

  // Euler's method at 1 ms, begun ten lags early so that the start is forgotten.
  let first = exhaust(-150);
  let second = first;
  const stepS = 0.001;
  let compared = 0;
  for (let step = 0; step < 205_000; step++) {
    const s = -150 + step * stepS;
    if (step % 5000 === 0 && s > -75 && s < 55) {
      const place = (s - shape.fromS) / shape.stepS;
      const row = Math.floor(place);
      const share = place - row;
      let sum = 0;
      [a0, a1, a2, b1, b2].forEach((coefficient, j) => {
        const low = shape.table[row * CURVES + j]!;
        const high = shape.table[(row + 1) * CURVES + j]!;
        sum += coefficient * (low * (1 - share) + high * share);
      });
      expect(Math.abs(sum - second)).toBeLessThan(0.01);
      compared++;
    }
    const firstBefore = first;
    first += ((exhaust(s) - first) / constants.lagAS) * stepS;
    second += ((firstBefore - second) / constants.lagBS) * stepS;
  }
  expect(compared).toBeGreaterThan(20);
});
