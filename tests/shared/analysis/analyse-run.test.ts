import { describe, expect, test } from 'vitest';
import { ANALYSIS_VERSION, analyseRun } from '#shared/analysis/analyse-run.ts';
import type { Mark, Series } from '#shared/analysis/series.ts';
import { fromCelsius, toCelsius, toKelvinStep } from '#shared/units.ts';
import { buildThermostatRun } from '#tests/support/build-series.ts';
import { plainInput } from './plain-input.ts';

/** Readings as a technician taps them in: minutes:seconds and whole °F. */
function tapped(readings: string): Series {
  const rows = readings
    .trim()
    .split(/\s+/)
    .map((reading) => {
      const [clock, tempF] = reading.split('=') as [string, string];
      const [minutes, seconds] = clock.split(':').map(Number) as [number, number];
      return { timeS: minutes * 60 + seconds, tempC: toCelsius(Number(tempF), 'F') };
    });
  return {
    timesS: Float64Array.from(rows, ({ timeS }) => timeS),
    tempsC: Float64Array.from(rows, ({ tempC }) => tempC),
  };
}

const HEAT_UP = '0:00=72 0:20=86 0:40=97 1:00=106 1:20=114 1:40=120 2:00=126 2:20=131 2:40=136';
const FIRST_PEAK = '3:00=140 3:20=144 3:40=148 4:00=151 4:20=154 4:34=156';
const CYCLE_ONE = '4:45=153 5:00=146 5:15=140 5:30=134 5:41=130 5:55=134 6:10=139 6:25=143';
const CYCLE_ONE_UP = '6:40=147 6:55=151 7:12=155';
const CYCLE_TWO = '7:25=150 7:40=143 7:55=137 8:10=132 8:16=130 8:30=134 8:45=139 9:00=143';
const CYCLE_TWO_UP = '9:15=147 9:30=151 9:46=155';
const CYCLE_THREE = '10:00=149 10:15=142 10:30=136 10:45=131 10:49=130 11:05=135 11:20=140';
const TAIL = '11:35=144 11:50=148 12:05=152 12:19=155 12:35=148 12:50=141';

const SOUND = [
  HEAT_UP,
  FIRST_PEAK,
  CYCLE_ONE,
  CYCLE_ONE_UP,
  CYCLE_TWO,
  CYCLE_TWO_UP,
  CYCLE_THREE,
  TAIL,
].join(' ');

function inF(tempC: number): number {
  return fromCelsius(tempC, 'F');
}

describe('hand-timed runs on figures of common practice', () => {
  test('a thermostat that cuts out at 155 and comes back at 130', () => {
    const { cutOuts, resets, cycles } = analyseRun(tapped(SOUND), plainInput());

    expect(cutOuts).toHaveLength(4);
    expect(resets).toHaveLength(3);
    expect(cycles).toHaveLength(3);
    const truthS = [274, 432, 586, 739];
    cutOuts.forEach(({ timeS, tempC, judged }, i) => {
      expect(Math.abs(timeS - truthS[i]!)).toBeLessThan(14);
      expect(Math.abs(inF(tempC) - 155)).toBeLessThan(3);
      expect(judged).toBe(i > 0);
    });
    for (const { tempC } of resets) expect(Math.abs(inF(tempC) - 130)).toBeLessThan(3);
    for (const { call } of [...cutOuts, ...resets]) expect(call).not.toBe('outside');
  });

  test('a peak near 165 can still be overshoot', () => {
    const high = tapped(SOUND);
    const lifted = high.tempsC.map((tempC) =>
      inF(tempC) > 131 ? tempC + ((inF(tempC) - 131) / 24) * (9 / 1.8) : tempC,
    );

    const { cutOuts } = analyseRun({ timesS: high.timesS, tempsC: lifted }, plainInput());

    const judged = cutOuts.filter((point) => point.judged);
    expect(judged).toHaveLength(3);
    for (const { call, tempC } of judged) {
      expect(Math.abs(inF(tempC) - 164)).toBeLessThan(4);
      expect(call).not.toBe('outside');
      expect(call).not.toBe('inside');
    }
  });

  const RUNAWAY = `${HEAT_UP} ${FIRST_PEAK.replace(' 4:34=156', '')} 4:40=157 5:00=160 5:20=163 5:40=166 6:00=170 6:20=173 6:40=175 7:00=178 7:20=180 7:40=183`;

  test('an exhaust that goes on through 175 and 180 has no cut-out, the heat cut by hand is none', () => {
    const marks: Mark[] = [{ timeS: 7 * 60 + 42, kind: 'heat-off' }];

    const { cutOuts, legs } = analyseRun(
      tapped(`${RUNAWAY} 7:55=184 8:10=178 8:25=170 8:40=161 8:55=152`),
      plainInput({ marks }),
    );

    expect(cutOuts).toEqual([]);
    expect(legs.map(({ kind }) => kind)).toEqual(['heating', 'cooling']);
  });

  test('a one-shot fuse that opens at the end of a runaway is no cut-out either', () => {
    const { cutOuts } = analyseRun(
      tapped(
        `${RUNAWAY} 8:00=186 8:20=189 8:40=192 9:00=195 9:15=197 9:30=190 9:45=180 10:00=170 10:20=157 10:40=145 11:00=135 11:20=126 11:40=118 12:00=111`,
      ),
      plainInput(),
    );

    expect(cutOuts).toEqual([]);
  });

  test('a stop as late as 210, in a record with a higher limit, is a person’s', () => {
    const input = plainInput({ marks: [{ timeS: 640, kind: 'stopped' }] });
    const rating = {
      ...input.rating!,
      highLimitC: toCelsius(225, 'F'),
      ceilingC: toCelsius(215, 'F'),
    };

    const { cutOuts } = analyseRun(
      tapped(
        `${RUNAWAY} 8:00=186 8:30=191 9:00=196 9:30=201 10:00=205 10:30=209 10:45=210 11:00=203 11:20=190`,
      ),
      { ...input, rating },
    );

    expect(cutOuts).toEqual([]);
  });

  test('heat that goes on after the thermostat opened leaves the earlier cut-outs standing', () => {
    // A path to the frame, open cold and closed hot: it cuts out twice and then climbs on.
    const { cutOuts, resets } = analyseRun(
      tapped(
        `${HEAT_UP} ${FIRST_PEAK} ${CYCLE_ONE} ${CYCLE_ONE_UP} ${CYCLE_TWO} ${CYCLE_TWO_UP} 10:00=156 10:20=160 10:40=164 11:00=168 11:20=172 11:40=176 12:00=181`,
      ),
      plainInput(),
    );

    expect(cutOuts).toHaveLength(2);
    expect(resets).toHaveLength(2);
  });
});

describe('an analysis', () => {
  const { series } = buildThermostatRun({ noiseK: 0.1 });

  test('carries the engine’s version, the record’s size and no guard yet', () => {
    const analysis = analyseRun(series, plainInput());

    expect(analysis).toMatchObject({
      version: ANALYSIS_VERSION,
      samples: series.timesS.length,
      durationS: series.timesS.at(-1),
      spikes: 0,
      gaps: [],
      notJudged: null,
      guardAlarmS: null,
    });
    expect(analysis.findings.length).toBeGreaterThan(0);
  });

  test('says why nothing is called', () => {
    const slow = { accuracyK: 0, calibrationUK: 0, correction: null, responseS: 60 };

    expect(analyseRun(series, plainInput({ rating: null })).notJudged).toBe('no-rating');
    expect(analyseRun(series, plainInput({ probe: slow })).notJudged).toBe('probe-too-slow');
  });

  test('calls the same when record and rating are shifted alike', () => {
    const { rating, ...input } = plainInput();
    const byK = toKelvinStep(37, 'F');
    const moved = {
      ...rating!,
      opensC: rating!.opensC + byK,
      closesC: rating!.closesC + byK,
      highLimitC: rating!.highLimitC + byK,
      ceilingC: rating!.ceilingC + byK,
    };

    const before = analyseRun(series, { ...input, rating });
    const after = analyseRun(
      { timesS: series.timesS, tempsC: series.tempsC.map((tempC) => tempC + byK) },
      { ...input, rating: moved },
    );

    expect(after.cutOuts.map(({ call }) => call)).toEqual(before.cutOuts.map(({ call }) => call));
    expect(after.resets.map(({ call }) => call)).toEqual(before.resets.map(({ call }) => call));
  });

  test('one wild reading changes no call', () => {
    const tempsC = series.tempsC.slice();
    tempsC[640] = 400;

    const spiked = analyseRun({ timesS: series.timesS, tempsC }, plainInput());
    const clean = analyseRun(series, plainInput());

    expect(spiked.spikes).toBe(1);
    expect(spiked.cutOuts.map(({ call }) => call)).toEqual(clean.cutOuts.map(({ call }) => call));
  });

  test('refuses what is no series', () => {
    const timesS = Float64Array.from([0, 1, 1]);

    expect(() => analyseRun({ timesS, tempsC: timesS }, plainInput())).toThrow(RangeError);
    expect(() => analyseRun({ timesS, tempsC: Float64Array.from([1, 2]) }, plainInput())).toThrow(
      RangeError,
    );
  });
});
