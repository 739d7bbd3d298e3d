import { expect, test } from 'vitest';
import { FINDING_CODES, type FindingCode } from '#shared/analysis/analysis.ts';
import { readArguments } from '#tests/bench/accuracy/arguments.ts';
import { makeRuns } from '#tests/bench/accuracy/make-runs.ts';
import { throughProbe } from '#tests/bench/accuracy/see-run.ts';
import { trueCodes, type TrueCodes } from '#tests/bench/accuracy/truth/true-codes.ts';
import { STEP_S, type ModelRun } from '#server/commands/heat-model/simulate-run.ts';

/** What is true of every plan of seed 1, as a probe reads it each second. */
const TOLD: { name: string; meant: FindingCode; truth: TrueCodes }[] = [];
for (const { seen } of makeRuns(readArguments(['1', '1', '--method', '1 s']))) {
  if (seen.method.name !== '1 s') continue;
  TOLD.push({ name: seen.plan.name, meant: seen.plan.meant, truth: trueCodes(seen) });
}

test('every finding is surely to be found in some run of a seed', () => {
  const expected = new Set(TOLD.map(({ truth }) => truth.expected[0]));

  expect(FINDING_CODES.filter((code) => !expected.has(code))).toEqual([]);
});

test('some runs lie so near a limit that two answers are right', () => {
  const near = TOLD.filter(({ truth }) => truth.expected.length === 0);

  expect(near.length).toBeGreaterThan(2);
  for (const { truth } of near) expect(truth.allowed.length).toBeGreaterThan(1);
});

test('the truth of a plain plan is what the plan is there to give', () => {
  const plain = [
    'sound',
    'opens high',
    'opens low',
    'relay sticks',
    'runs away from cold',
    'grounded coil hangs',
    'fuse opens',
    'weak heat',
    'no heat',
    'damp load',
  ];

  for (const { meant, truth, name } of TOLD.filter((told) => plain.includes(told.name)))
    expect(truth.expected[0], name).toBe(meant);
});

test('in no sound machine may heat stay on, run away or be lost', () => {
  for (const { name, truth } of TOLD.filter((told) => told.name.startsWith('sound'))) {
    const may = [...truth.expected, ...truth.allowed];
    expect(
      may.filter((code) => FINDING_CODES.indexOf(code) < 3),
      name,
    ).toEqual([]);
  }
});

test('a step of the air reaches a probe as a first-order response does', () => {
  const outletC = new Float64Array(601).fill(100);
  outletC[0] = 0;
  const run: ModelRun = {
    outletC,
    probeC: outletC,
    switches: [],
    clicksS: [],
    heatOffS: null,
  };

  const { probeC } = throughProbe(run, 10);

  // Fraction reached 1 − e^(−n) at n time constants; the step comes one STEP_S late here.
  expect(probeC[Math.round(10 / STEP_S) + 1]! / 100).toBeCloseTo(0.632, 2);
  expect(probeC[Math.round(20 / STEP_S) + 1]! / 100).toBeCloseTo(0.865, 2);
  expect(probeC[Math.round(30 / STEP_S) + 1]! / 100).toBeCloseTo(0.95, 2);
});
