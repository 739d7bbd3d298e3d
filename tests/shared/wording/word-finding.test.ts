import { describe, expect, test } from 'vitest';
import { FINDING_CODES, type Finding } from '#shared/analysis/analysis.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { TOO_SHORT_REASONS } from '#shared/analysis/findings/too-short.ts';
import { wordFinding } from '#shared/wording/word-finding.ts';
import { RUNS } from './worded-runs.ts';

const FUELS = ['electric', 'gas'] as const;
const bare = (code: Finding['code']): Finding => ({ code, fromS: 0, toS: 60, evidence: {} });
const told = RUNS.flatMap(({ analysis, rating }) =>
  analysis.findings.flatMap((finding) =>
    FUELS.map((fuel) => ({
      finding,
      worded: wordFinding(finding, { unit: 'F', judgedBy: rating, fuel }),
    })),
  ),
);

function everyWord({
  title,
  sentences,
  causes,
  nextChecks,
}: (typeof told)[number]['worded']): string {
  const reasons = causes.flatMap(({ cause, why, settles }) => [cause, why, settles]);
  return [title, ...sentences, ...reasons, ...nextChecks].join('\n');
}

describe.each(FUELS)('on a machine of fuel %s', (fuel) => {
  test.each(FINDING_CODES)(
    '%s has a title, a sentence and a next check even with no evidence',
    (code) => {
      const worded = wordFinding(bare(code), { unit: 'F', judgedBy: null, fuel });

      expect(worded.title).not.toBe('');
      expect(worded.title.length).toBeLessThanOrEqual(60);
      expect(worded.nextChecks.length).toBeGreaterThan(0);
    },
  );

  test.each(FINDING_CODES.filter((code) => !['too-close', 'too-short', 'in-band'].includes(code)))(
    '%s names causes, each with its reason and what settles it',
    (code) => {
      const { causes } = wordFinding(bare(code), { unit: 'F', judgedBy: DEFAULT_RATING, fuel });

      expect(causes.length).toBeGreaterThan(1);
      for (const { cause, why, settles } of causes) {
        expect([cause, why, settles].every((words) => words.length > 10)).toBe(true);
      }
    },
  );
});

test('no word suggests going round a safety device, praises, or begs', () => {
  for (const { worded } of told) {
    expect(everyWord(worded)).not.toMatch(/jumper|bypass|bridge|guarantee|please|oops|success|!/i);
  }
});

test('what the readings point to is told as consistent with, never as a certainty', () => {
  const certain = [
    'too-close',
    'too-short',
    'in-band',
    'mixed',
    'opens-high',
    'opens-low',
    'closes-high',
    'closes-low',
  ];
  for (const { finding, worded } of told.filter((one) => !certain.includes(one.finding.code))) {
    const afterUnknown = finding.evidence.afterTrip === null;

    expect(worded.sentences.join(' ')).toMatch(afterUnknown ? /cannot be told/ : /consistent with/);
  }
});

test('every number of the evidence has a label in words', () => {
  for (const { finding, worded } of told) {
    for (const { label, value } of worded.evidence) {
      expect(Object.keys(finding.evidence), `${finding.code} ${label}`).not.toContain(label);
      expect(value).not.toMatch(/NaN|undefined|null|^[a-z]+-[a-z]/);
    }
  }
});

test('a runaway after the thermostat opened has another title than one that never opened', () => {
  const about = { unit: 'F' as const, judgedBy: DEFAULT_RATING, fuel: 'electric' };
  const after = wordFinding({ ...bare('runaway'), evidence: { afterTrip: true } }, about);
  const never = wordFinding({ ...bare('runaway'), evidence: { afterTrip: false } }, about);

  expect(after.title).toBe('Heat kept coming after the thermostat opened');
  expect(never.title).toBe('Heat ran on with no cut-out');
  expect(after.causes[0]?.cause).toMatch(/relay/i);
  expect(never.causes[0]?.cause).toMatch(/thermostat stuck closed/i);
});

test('a coil that touches its box is a cause on an electric machine only', () => {
  const about = { unit: 'F' as const, judgedBy: DEFAULT_RATING };
  const causesOf = (fuel: string) =>
    wordFinding(bare('heat-stays-on'), { ...about, fuel })
      .causes.map(({ cause }) => cause)
      .join();

  expect(causesOf('electric')).toMatch(/coil that touches its box/);
  expect(causesOf('gas')).not.toMatch(/coil that touches/);
  expect(causesOf('gas')).toMatch(/valve/i);
});

test('short, hot bursts lead to the airflow first', () => {
  const { causes, nextChecks } = wordFinding(bare('limit-cycling'), {
    unit: 'F',
    judgedBy: DEFAULT_RATING,
    fuel: 'electric',
  });

  expect(causes[0]?.cause).toMatch(/duct/);
  expect(nextChecks[0]).toMatch(/duct off/);
});

test('a run that was made already is not asked for', () => {
  const checks = (code: 'in-band' | 'limit-cycling', ducts?: ('on' | 'off')[]) =>
    wordFinding(bare(code), {
      ...{ unit: 'F', judgedBy: DEFAULT_RATING, fuel: 'electric' },
      ...(ducts && { ducts }),
    }).nextChecks.filter((check) => /run with the duct/.test(check)).length;

  expect([checks('in-band'), checks('in-band', ['off']), checks('in-band', ['on', 'off'])]).toEqual(
    [1, 1, 0],
  );
  expect([checks('limit-cycling', ['on']), checks('limit-cycling', ['off'])]).toEqual([1, 0]);
});

test.each(TOO_SHORT_REASONS)(
  'a record too short because of %s says so in its own words',
  (reason) => {
    const about = { unit: 'F' as const, judgedBy: DEFAULT_RATING, fuel: 'electric' };
    const worded = wordFinding({ ...bare('too-short'), evidence: { reason } }, about);
    const others = TOO_SHORT_REASONS.filter((other) => other !== reason).map(
      (other) => wordFinding({ ...bare('too-short'), evidence: { reason: other } }, about).title,
    );

    expect(others).not.toContain(worded.title);
    expect(worded.sentences).toHaveLength(1);
  },
);

test('the evidence is told in the unit of the reader', () => {
  const finding = { ...bare('scattered'), evidence: { cutOuts: 5, sdK: 5, allowedK: 20 / 9 } };
  const inF = wordFinding(finding, { unit: 'F', judgedBy: DEFAULT_RATING, fuel: 'gas' }).evidence;
  const inC = wordFinding(finding, { unit: 'C', judgedBy: DEFAULT_RATING, fuel: 'gas' }).evidence;

  // A step of 5 K is 9 °F (NIST SP 811, B.8: an interval has no offset).
  expect(inF[1]).toEqual({ label: 'Standard deviation', value: '9.0\u00a0°F' });
  expect(inC[1]).toEqual({ label: 'Standard deviation', value: '5.0\u00a0°C' });
});

describe('a machine whose heat a board switches by a thermistor', () => {
  const about = { unit: 'F' as const, judgedBy: DEFAULT_RATING, fuel: 'electric' };
  const causesOf = (finding: Finding, control: string) =>
    wordFinding(finding, { ...about, control })
      .causes.map(({ cause }) => cause)
      .join('; ');
  const never = { ...bare('runaway'), evidence: { afterTrip: false } };

  test('that never cut out leads to the thermistor first, and to no cycling thermostat', () => {
    expect(causesOf(never, 'thermistor')).toMatch(/^Thermistor open/);
    expect(causesOf(never, 'thermistor')).not.toMatch(/thermostat/i);
    expect(causesOf(never, 'thermostat')).toMatch(/^Cycling thermostat stuck closed/);
    expect(causesOf(never, 'thermostat')).not.toMatch(/thermistor/i);
  });

  test.each(FINDING_CODES.filter((code) => /^(opens|closes)-|drifting|scattered/.test(code)))(
    '%s names no disc, no bias heater and no mark on a thermostat',
    (code) => {
      const worded = wordFinding(bare(code), { ...about, control: 'thermistor' });

      expect(everyWord(worded)).not.toMatch(
        /\bdisc\b|bias|mark on the thermostat|pitted thermostat/i,
      );
      expect(worded.causes.length).toBeGreaterThan(1);
    },
  );

  test('opens-high and opens-low blame the thermistor in opposite directions', () => {
    expect(causesOf(bare('opens-high'), 'thermistor')).toMatch(/^Thermistor .*reading cold/);
    expect(causesOf(bare('opens-low'), 'thermistor')).toMatch(/^Thermistor that reads hot/);
  });

  test('gas or electric, no cause of a gas machine names an element', () => {
    for (const code of FINDING_CODES) {
      const worded = wordFinding(bare(code), { ...about, fuel: 'gas', control: 'thermistor' });

      expect(everyWord(worded), code).not.toMatch(/element|coil that touches|grounded/i);
    }
  });
});
