import { describe, expect, test } from 'vitest';
import type { Answers, ReadOutcome } from '#shared/reading/log-reading.ts';
import { readLog } from '#shared/reading/read-log.ts';

/** NIST SRD 60: type K at 20, 50, 68, 80 and 100 °C against 0 °C. */
const K_MV = [0.798, 2.023, 2.768, 3.267, 4.096];
const K_C = [20, 50, 68, 80, 100];

function log(header: string, values: (number | string)[], preamble = ''): Uint8Array {
  const rows = values.map((value, i) => `${i * 2},${value}`);
  return new TextEncoder().encode([preamble + header, ...rows, ''].join('\n'));
}

function read(bytes: Uint8Array, answers: Answers = {}): ReadOutcome {
  return readLog(bytes, { answers });
}

function tempsOf(outcome: ReadOutcome): number[] {
  if (outcome.kind !== 'read') throw new Error(JSON.stringify(outcome));
  expect(outcome.reading.channelUnit).toBe('C');
  return [...outcome.reading.temps];
}

function warningsOf(outcome: ReadOutcome): string[] {
  if (outcome.kind !== 'read') throw new Error(JSON.stringify(outcome));
  return outcome.reading.warnings.map(({ message }) => message);
}

function expectNear(temps: number[], expected: number[], within = 0.02): void {
  expect(temps.length).toBe(expected.length);
  temps.forEach((temp, i) => expect(Math.abs(temp - expected[i]!)).toBeLessThan(within));
}

describe('a log in millivolts', () => {
  test('is asked about, with what each type would give', () => {
    const outcome = read(log('Time (s),Exhaust (mV)', K_MV));

    if (outcome.kind !== 'question') throw new Error(outcome.kind);
    expect(outcome.question.about).toBe('unit');
    expect(outcome.question.options.map(({ answer }) => answer)).toEqual(['mV-K', 'mV-J', 'mV-T']);
    expect(outcome.question.options[0]!.label).toContain('0 °C or already compensated');
    expect(outcome.question.options[0]!.preview[2]!.temp).toBeCloseTo(68, 1);
    // The same 2.768 mV: NIST SRD 60 has J 53 °C at 2.744, T 67 °C at 2.776.
    expect(outcome.question.options[2]!.preview[2]!.temp).toBeCloseTo(66.8, 1);
  });

  test('is converted as it is answered, and says so', () => {
    const outcome = read(log('Time (s),Exhaust (mV)', K_MV), { unit: 'mV-K' });

    expectNear(tempsOf(outcome), K_C);
    expect(warningsOf(outcome)[0]).toBe(
      'Exhaust (mV) holds mV. It was converted to °C as type K thermocouple (IEC 60584-1), terminals at 0 °C or already compensated.',
    );
  });

  test.each(['Type K (mV)', 'TC-K mV', 'Thermocouple K [mV]', 'K-type mV', 'type_k_mv'])(
    '%s needs no question',
    (name) => {
      expectNear(tempsOf(read(log(`Time (s),${name}`, K_MV))), K_C);
    },
  );

  test('adds the voltage of the terminals where a column gives their temperature', () => {
    // pypi.org/project/thermocouple-its90: K, 4.096 mV with terminals at 25 °C is 124.3 °C.
    const rows = [4.096, 4.096, 4.096].map((mV, i) => `${i},${mV},25`);
    const text = ['Time (s),Type K (mV),Cold junction (°C)', ...rows, ''].join('\n');
    const outcome = read(new TextEncoder().encode(text));

    expectNear(tempsOf(outcome), [124.31, 124.31, 124.31]);
    expect(warningsOf(outcome)[0]).toContain('terminals as in Cold junction (°C)');
  });

  test('adds it where the lines above state it', () => {
    const preamble = 'Reference junction: 77 °F\n';
    const outcome = read(log('Time (s),Type K (mV)', [4.096, 4.096, 4.097], preamble));

    expectNear(tempsOf(outcome), [124.31, 124.31, 124.33]);
  });

  test('with the unit in its cells, a unit row or above the table is the same', () => {
    const cells = K_MV.map((mV) => `${mV} mV`);
    expectNear(tempsOf(read(log('Time (s),Type K', cells))), K_C);
    expectNear(tempsOf(read(log('Time,Type K\ns,mV', K_MV))), K_C);
    expectNear(tempsOf(read(log('Time (s),Type K', K_MV, 'Units: mV\n'))), K_C);
  });

  test('sets aside what no thermocouple gives, by row', () => {
    const outcome = read(log('Time (s),Type K (mV)', [0.798, 2.023, 99.9, 3.267, 4.096]));

    expectNear(tempsOf(outcome), [20, 50, 80, 100]);
    if (outcome.kind !== 'read') throw new Error(outcome.kind);
    expect(outcome.reading.skippedRows).toEqual([{ row: 4, why: 'the sensor cannot give 99.9' }]);
  });

  test('gives way to a column of temperatures', () => {
    const rows = K_C.map((tempC, i) => `${i},${K_MV[i]},${tempC}`);
    const text = ['Time (s),Type K (mV),Exhaust (°C)', ...rows, ''].join('\n');
    const outcome = read(new TextEncoder().encode(text));

    expect(tempsOf(outcome)).toEqual(K_C);
    expect(warningsOf(outcome).join()).not.toContain('converted');
  });

  test('of a battery is no temperature', () => {
    const outcome = read(log('Time (s),Battery (mV)', [2900, 2899, 2898, 2890]));

    expect(outcome.kind === 'refused' && outcome.problem.code).toBe('no-temperature');
  });
});

describe('a log in ohms', () => {
  test('is a Pt100 where it says so', () => {
    // IEC 60751: 107.79 at 20, 127.08 at 70, 138.51 at 100 °C; two decimals are 0.013 °C.
    for (const name of ['Pt100 (ohm)', 'RTD [Ω]', 'PT-100 Ω']) {
      expectNear(tempsOf(read(log(`Time (s),${name}`, [107.79, 127.08, 138.51]))), [20, 70, 100]);
    }
  });

  test('asks for the sensor, the likeliest first', () => {
    const pt = read(log('Time (s),Exhaust (ohm)', [107.79, 127.08, 138.51]));
    // Amphenol type 1: 10 kΩ gives 12.49 at 20, 5.325 at 40, 1.751 at 70 °C.
    const ntc = read(log('Time (s),Exhaust (kΩ)', [12.49, 5.325, 1.751]));

    if (pt.kind !== 'question' || ntc.kind !== 'question') throw new Error('asked');
    expect(pt.question.options[0]!.answer).toBe('ohm-Pt100');
    expect(ntc.question.options[0]!.answer).toBe('ohm-NTC-10k');
    expect(ntc.question.options.map(({ answer }) => answer)).not.toContain('ohm-Pt100');
  });

  test('is read in kilohms too, also where a meter changes its range between rows', () => {
    const header = 'Time (s),Thermistor NTC 10k (kΩ)';
    expectNear(tempsOf(read(log(header, [12.49, 5.325, 1.751]))), [20, 40, 70], 0.05);

    const ranging = read(log('Time (s),NTC 10k', ['12.49 kΩ', '1.751 kΩ', '678.1 Ω']));
    expectNear(tempsOf(ranging), [20, 70, 100], 0.05);
  });
});

describe('an answer that fits no sensor of the file', () => {
  test('is refused by name', () => {
    const outcome = read(log('Time (s),Exhaust (mV)', K_MV), { unit: 'ohm-Pt100' });

    expect(outcome.kind === 'refused' && outcome.problem.code).toBe('unknown-answer');
  });

  test('may say that it is a temperature after all', () => {
    const outcome = read(log('Time (s),Temp mV', [20, 50, 68, 80, 100]), { unit: 'C' });

    expect(tempsOf(outcome)).toEqual(K_C);
  });
});
