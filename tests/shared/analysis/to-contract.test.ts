import { describe, expect, test } from 'vitest';
import type { Analysis } from '#shared/analysis/analysis.ts';
import { toContract, type ReadFacts } from '#shared/analysis/to-contract.ts';

const READ: ReadFacts = {
  timeColumn: 'Elapsed',
  channel: 'Exhaust °F',
  channelUnit: 'F',
  delimiter: ',',
  decimal: '.',
  skippedRows: [{ row: 14, why: 'not a number: OL' }],
  warnings: [{ code: 'gap', row: 301, message: 'No readings for 40 s.' }],
};

const ANALYSIS: Analysis = {
  version: '1',
  samples: 812,
  durationS: 1620,
  spikes: 2,
  gaps: [{ fromS: 300, toS: 340 }],
  noiseK: 0.1,
  cutOuts: [
    {
      kind: 'cut-out',
      timeS: 206.30412,
      tempC: 68.3333333,
      uK: 1 / 3,
      uTotalK: 1.25,
      judged: false,
      call: null,
      probability: 0.99971234,
      switchTimeS: 201.8,
      switchTempC: 67.5,
      switchUS: 0.9,
    },
  ],
  resets: [],
  cycles: [{ offS: 71.7, onS: 115.2, swingK: 10 }],
  legs: [
    {
      kind: 'heating',
      fromS: 0,
      toS: 206.3,
      asymptoteC: 83,
      asymptoteUK: 1,
      tauS: 131,
      tauUS: 4,
      knee: { timeS: 100, tempC: 50 },
    },
    {
      kind: 'cooling',
      fromS: 206.3,
      toS: 278,
      asymptoteC: null,
      asymptoteUK: null,
      tauS: null,
      tauUS: null,
      knee: null,
    },
  ],
  findings: [
    {
      code: 'in-band',
      fromS: 0,
      toS: 1620,
      evidence: {
        cutOuts: 5,
        meanCutOutC: 68,
        spreadK: 1,
        rateKPerS: -0.5,
        hangS: 12.3456,
        afterTrip: null,
        how: 'hangs',
        boundC: Infinity,
      },
    },
  ],
  outcome: 'proven',
  notJudged: null,
  guardAlarmS: null,
};

const SOURCE = { file: 'a.csv', unit: 'F' as const, read: READ, analysis: ANALYSIS };

describe('toContract', () => {
  test('prints every key of contract 1, in the output’s unit', () => {
    // 68.3333333 °C = 155 °F; 1/3 K = 0.6 °F; 10 K = 18 °F (NIST SP 811, B.8).
    expect(toContract(SOURCE)).toEqual({
      contract: 1,
      file: 'a.csv',
      unit: 'F',
      samples: 812,
      durationS: 1620,
      read: { ...READ, spikes: 2, gaps: 1 },
      cutOuts: [
        {
          t: 206.3,
          temp: 155,
          u: 0.6,
          uTotal: 2.25,
          judged: false,
          call: null,
          probability: 0.999712,
          switchT: 201.8,
          switchTemp: 153.5,
          switchU: 0.9,
        },
      ],
      resets: [],
      cycles: [{ offS: 71.7, onS: 115.2, swing: 18 }],
      legs: [
        {
          kind: 'heating',
          from: 0,
          to: 206.3,
          asymptote: 181.4,
          asymptoteU: 1.8,
          tau: 131,
          tauU: 4,
          knee: { t: 100, temp: 122 },
        },
        {
          kind: 'cooling',
          from: 206.3,
          to: 278,
          asymptote: null,
          asymptoteU: null,
          tau: null,
          tauU: null,
          knee: null,
        },
      ],
      findings: [
        {
          code: 'in-band',
          from: 0,
          to: 1620,
          evidence: {
            cutOuts: 5,
            meanCutOut: 154.4,
            spread: 1.8,
            ratePerS: -0.9,
            hangS: 12.3456,
            afterTrip: null,
            how: 'hangs',
            bound: null,
          },
        },
      ],
      outcome: 'proven',
      guard: { alarmT: null },
    });
  });

  test('prints °C as they are', () => {
    const { cutOuts, cycles } = toContract({ ...SOURCE, unit: 'C' });

    expect(cutOuts[0]!.temp).toBe(68.333);
    expect(cycles[0]!.swing).toBe(10);
  });

  test('never rounds the series, and leaves it out where it was not asked for', () => {
    const series = { t: [0, 1 / 3], temp: [155.00000000000003, 0.1] };

    expect(toContract({ ...SOURCE, series }).series).toEqual(series);
    expect(toContract(SOURCE)).not.toHaveProperty('series');
  });

  test('turns alone come with everything else empty', () => {
    const { version, samples, durationS, spikes, gaps, noiseK, cutOuts, resets } = ANALYSIS;
    const analysis = { samples, durationS, spikes, gaps, noiseK, cutOuts, resets };

    const printed = toContract({ ...SOURCE, analysis });

    expect(version).toBe('1');
    expect(printed.cutOuts).toHaveLength(1);
    expect(printed).toMatchObject({ cycles: [], legs: [], findings: [], outcome: null });
  });
});
