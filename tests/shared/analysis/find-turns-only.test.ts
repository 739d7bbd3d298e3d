import { expect, test } from 'vitest';
import { findTurnsOnly } from '#shared/analysis/find-turns-only.ts';
import { buildThermostatRun } from '#tests/support/build-series.ts';

const PROBE = { accuracyK: 0.5, calibrationUK: 0, correction: null, responseS: null };

test('gives every peak and valley, the first included, and calls none', () => {
  const { series, turns } = buildThermostatRun({ noiseK: 0.1 });
  // Cut so that the record starts in a fall: its first valley follows no cut-out.
  const from = Math.round(turns[0]!.timeS) + 15;
  const part = {
    timesS: series.timesS.slice(from).map((timeS) => timeS - from),
    tempsC: series.tempsC.slice(from),
  };

  const { cutOuts, resets } = findTurnsOnly(part, 4 / 1.8, PROBE);

  expect(resets).toHaveLength(turns.filter(({ kind }) => kind === 'valley').length);
  expect(cutOuts).toHaveLength(turns.filter(({ kind }) => kind === 'peak').length - 1);
  expect(Math.abs(resets[0]!.timeS + from - turns[1]!.timeS)).toBeLessThan(3);
  for (const { judged, call, probability } of [...cutOuts, ...resets]) {
    expect([judged, call, probability]).toEqual([false, null, null]);
  }
});
