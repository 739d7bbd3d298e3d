import { expect, test } from 'vitest';
import { acceptUploadSchema } from '#shared/schemas/runs.ts';
import type { ReadPreview, Upload } from '#shared/schemas/uploads.ts';
import {
  acceptFormSchema,
  emptyForm,
  partSpans,
  toAcceptUpload,
} from '#client/pages/upload/accept-form.ts';
import { withDraft } from '#client/pages/upload/upload-draft.ts';

const visitId = '0b7c0f5e-8f0a-4c8e-9a61-0f4f6d6b2a11';
const durationS = 1199.95;

const preview: ReadPreview = {
  timeColumn: 'Elapsed',
  channel: 'Exhaust',
  channelUnit: 'F',
  columns: [],
  encoding: 'utf-8',
  delimiter: ',',
  decimal: '.',
  clock: 'elapsed m:ss',
  startedAt: null,
  rows: 600,
  samples: 600,
  durationS,
  skippedRows: [],
  skippedCount: 0,
  warnings: [],
  preview: [],
  resultHash: 'abc',
  trace: [],
  parts: [
    { fromS: 0, toS: 500 },
    { fromS: 700, toS: durationS },
  ],
  analysis: {
    version: '1',
    samples: 600,
    durationS,
    spikes: 0,
    gaps: [],
    noiseK: 0.1,
    cutOuts: [],
    resets: [],
    cycles: [],
    legs: [],
    findings: [],
    outcome: 'not-proven',
    notJudged: null,
    guardAlarmS: null,
  },
};

const upload: Upload = {
  id: '3d4a2f0e-1111-4c8e-9a61-0f4f6d6b2a11',
  visitId,
  fileName: 'probe.csv',
  bytes: 1000,
  choices: { answers: {}, channel: null },
  reading: { state: 'read', preview },
};

const answered = {
  probeId: '',
  placement: 'At the outlet',
  duct: 'on',
  load: 'empty',
  setting: 'high',
  roomTemp: '',
  roomUnit: 'F' as const,
};

function faultsOf(form: unknown): Record<string, string> {
  const checked = acceptFormSchema(durationS).safeParse(form);
  const issues = checked.success ? [] : checked.error.issues;
  return Object.fromEntries(issues.map(({ path, message }) => [path.join('.'), message]));
}

test('what bears on the judgement is asked for, never assumed', () => {
  expect(faultsOf(emptyForm(preview, 'F', 1))).toEqual({
    'conditions.placement': 'Enter where the probe sat',
    'conditions.duct': 'Say whether the duct was on or off',
    'conditions.load': 'Say what was in the drum',
    'conditions.setting': 'Say which heat setting it ran on',
  });
});

test('an answered form goes to the server as its schema wants it', () => {
  const form = { ...emptyForm(preview, 'F', 3), conditions: answered };

  const sent = toAcceptUpload(acceptFormSchema(durationS).parse(form), upload, preview);

  expect(acceptUploadSchema.parse(sent)).toEqual({
    visitId,
    resultHash: 'abc',
    conditions: { ...answered, probeId: null, roomTemp: null },
    marks: [],
    spans: [{ label: 'Run 3', fromS: 0, toS: durationS }],
    startedAtMs: null,
  });
});

test('a room temperature may be typed with a comma and a minus sign', () => {
  const conditions = { ...answered, roomTemp: '−2,5', roomUnit: 'C' };

  const form = acceptFormSchema(durationS).parse({ ...emptyForm(preview, 'F', 1), conditions });

  expect(form.conditions.roomTemp).toBe(-2.5);
});

test('each fault is told at its own field', () => {
  const form = {
    conditions: { ...answered, roomTemp: 'warm' },
    spans: [
      { label: 'Run 1', fromS: '5:00', toS: '3:00' },
      { label: '', fromS: '0:00', toS: '21:00' },
    ],
    marks: [{ timeS: '12', kind: 'click', text: '' }],
  };

  expect(faultsOf(form)).toEqual({
    'conditions.roomTemp': 'Enter a number, like 70',
    'spans.0.toS': 'End after it starts',
    'spans.1.label': 'Enter a name for the run',
    'spans.1.toS': 'The record ends at 20:00',
    'marks.0.timeS': 'Write minutes and seconds, like 3:47',
  });
});

test('a mark goes with its words only where there are any', () => {
  const form = acceptFormSchema(durationS).parse({
    ...emptyForm(preview, 'F', 1),
    conditions: answered,
    marks: [
      { timeS: '3:20', kind: 'click', text: '' },
      { timeS: '4:00', kind: 'note', text: ' lid moved ' },
    ],
  });

  expect(toAcceptUpload(form, upload, preview).marks).toEqual([
    { timeS: 200, kind: 'click' },
    { timeS: 240, kind: 'note', text: 'lid moved' },
  ]);
});

test('the parts that a pause leaves are proposed as runs in order', () => {
  expect(partSpans(preview.parts, 2)).toEqual([
    { label: 'Run 2', fromS: '0:00', toS: '8:20' },
    { label: 'Run 3', fromS: '11:40', toS: '20:00' },
  ]);
});

test('a file read anew keeps what was typed, and starts its spans over', () => {
  const fresh = emptyForm(preview, 'F', 1);
  const left = {
    ...fresh,
    conditions: answered,
    spans: [{ label: 'Before', fromS: '1:00', toS: '2:00' }],
  };

  expect(withDraft(fresh, { resultHash: 'abc', form: left }, 'abc')).toEqual(left);
  expect(withDraft(fresh, { resultHash: 'other', form: left }, 'abc')).toEqual({
    ...left,
    spans: fresh.spans,
  });
});
