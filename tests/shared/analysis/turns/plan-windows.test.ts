import fc from 'fast-check';
import { expect, test } from 'vitest';
import { planWindows } from '#shared/analysis/turns/plan-windows.ts';

test('reads every turn off exactly one window, and off no window’s far side', () => {
  const lengths = fc.array(fc.double({ min: 5, max: 500, noNaN: true }), {
    minLength: 2,
    maxLength: 60,
  });
  fc.assert(
    fc.property(lengths, (legsS) => {
      const edgesS = [0];
      for (const legS of legsS) edgesS.push(edgesS.at(-1)! + legS);
      const read: number[] = [];
      for (const window of planWindows(edgesS, 12)) {
        for (let turn = window.readFrom; turn < window.readTo; turn++) {
          read.push(turn);
          expect(window.startS).toBeLessThan(edgesS[turn]!);
          expect(window.endS).toBeGreaterThan(edgesS[turn]!);
        }
        expect(window.from).toBeLessThanOrEqual(window.readFrom);
        expect(window.to).toBeGreaterThanOrEqual(window.readTo);
      }
      expect(read).toEqual(Array.from({ length: edgesS.length - 2 }, (_, i) => i + 1));
    }),
  );
});

test('a leg far longer than the others is not fitted across', () => {
  const edgesS = [0, 300, 360, 450, 510, 600, 2600, 2690, 2750, 2840];

  const windows = planWindows(edgesS, 12);

  expect(windows).toHaveLength(2);
  expect(windows[0]!.endS).toBeLessThan(2600);
  expect(windows[1]!.startS).toBeGreaterThan(2400);
});
