import { describe, expect, test } from 'vitest';
import { FINDING_CODES, type Analysis } from '#shared/analysis/analysis.ts';
import { wordForCustomer, type WordedForCustomer } from '#shared/wording/word-for-customer.ts';
import { RUNS } from './worded-runs.ts';

const conditions = {
  unit: 'F' as const,
  fuel: 'electric',
  duct: 'on' as const,
  load: 'empty' as const,
};

function everyWord({
  heading,
  safeTonight,
  summary,
  chartSentence,
  meaning,
  next,
}: WordedForCustomer) {
  return [heading, safeTonight.sentence, ...summary, chartSentence, ...meaning, ...next].join('\n');
}

function runOf(file: string) {
  const run = RUNS.find(({ story }) => story.file === file);
  if (!run) throw new Error(`no sample ${file}`);
  return run;
}

function wordedRun(file: string): WordedForCustomer {
  const { analysis, rating } = runOf(file);
  return wordForCustomer(analysis, rating, conditions);
}

/** An analysis with another headline and outcome: words depend on these and on the points. */
function headed(code: (typeof FINDING_CODES)[number], outcome: Analysis['outcome']): Analysis {
  const { analysis } = runOf('in-band-electric-iso.csv');
  return { ...analysis, outcome, findings: [{ code, fromS: 0, toS: 60, evidence: {} }] };
}

describe.each(FINDING_CODES)('%s', (code) => {
  const worded = wordForCustomer(headed(code, 'not-proven'), null, conditions);

  test('has a heading, a meaning and a next step in plain words', () => {
    expect(worded.heading).toMatch(/\.$/);
    expect(worded.meaning.length).toBeGreaterThan(0);
    expect(worded.next.length).toBeGreaterThan(0);
  });

  test('is never called safe where the run is not proven', () => {
    expect(worded.safeTonight.answer).not.toBe('yes');
  });

  test('is not safe where the outcome is stop', () => {
    const stop = wordForCustomer(headed(code, 'stop'), null, conditions);

    expect(stop.safeTonight.answer).toBe('no');
    expect(stop.safeTonight.sentence).toMatch(/unplugged/);
  });
});

test('the gas is to be closed on a gas machine, and not spoken of on an electric one', () => {
  const stopped = headed('runaway', 'stop');

  const gas = wordForCustomer(stopped, null, { ...conditions, fuel: 'gas' });
  const electric = wordForCustomer(stopped, null, conditions);

  expect(gas.safeTonight.sentence).toMatch(/its gas closed/);
  expect(electric.safeTonight.sentence).not.toMatch(/gas/);
});

test('no run is told in the words of the trade, with a forecast of fire, or with a guarantee', () => {
  for (const { analysis, rating } of RUNS) {
    const words = everyWord(wordForCustomer(analysis, rating, conditions));

    expect(words).not.toMatch(/cut-out|thermostat|exhaust|differential|static|ohm|TCO|duct/i);
    expect(words).not.toMatch(/fire|guarantee|meets? code|please|oops|success|!/i);
  }
});

test('a proven run may be used, and says at what temperatures the heat stopped', () => {
  const { safeTonight, summary, heading } = wordedRun('in-band-electric-iso.csv');

  expect(heading).toBe('The heat stops and starts as it should.');
  expect(safeTonight.answer).toBe('yes');
  expect(summary.join(' ')).toMatch(/should stop at 150–160\u00a0°F\. It stopped at 15[45]\.\d/);
});

test('a runaway tells how hot the air got and that the heat did not stop', () => {
  const { safeTonight, summary } = wordedRun('runaway-relay-sticks.csv');

  expect(safeTonight.answer).toBe('no');
  expect(summary.join(' ')).toMatch(/it did not\. The air reached 18[67]\.\d\u00a0°F/);
});

test('a crushed pipe is told as a pipe', () => {
  expect(wordedRun('limit-cycling-crushed-duct.csv').meaning.join(' ')).toMatch(/pipe/);
});

test('the conditions of the test are told', () => {
  const { analysis, rating } = runOf('in-band-electric-iso.csv');
  const off = wordForCustomer(analysis, rating, {
    ...conditions,
    unit: 'C',
    duct: 'off',
    load: 'damp',
  });

  expect(off.summary[0]).toMatch(/damp load/);
  expect(off.summary[0]).toMatch(/taken off/);
  expect(off.meaning.join(' ')).toMatch(/says nothing of the pipe/);
  expect(off.chartSentence).toMatch(/°C/);
});

test('a damp load is told as the reason, not as a fault', () => {
  const { safeTonight, meaning } = wordedRun('damp-load-sound.csv');

  expect(safeTonight.answer).toBe('ask-us');
  expect(meaning[0]).toMatch(/still damp/);
});

test('an analysis without a finding is refused', () => {
  const { analysis } = runOf('in-band-electric-iso.csv');

  expect(() => wordForCustomer({ ...analysis, findings: [] }, null, conditions)).toThrow(
    RangeError,
  );
});
