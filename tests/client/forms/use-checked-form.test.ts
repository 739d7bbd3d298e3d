import type { FieldErrors } from 'react-hook-form';
import { expect, test } from 'vitest';
import { readNumber } from '#client/forms/typed-number.ts';
import { problemsOf } from '#client/forms/use-checked-form.ts';
import { countProblems } from '#client/components/error-summary.tsx';
import { fieldId } from '#client/components/field.tsx';

test('a form’s faults are listed by field, and a refusal of the whole stands last', () => {
  const errors: FieldErrors = {
    name: { type: 'custom', message: 'Enter a name' },
    span: { label: { type: 'custom', message: 'Enter a name for the run' } },
  };

  expect(problemsOf(errors, 'The shop’s server does not answer.')).toEqual([
    { name: 'name', message: 'Enter a name' },
    { name: 'span.label', message: 'Enter a name for the run' },
    { name: null, message: 'The shop’s server does not answer.' },
  ]);
});

test('a fault links to the id of its field', () => {
  expect(fieldId('spans.0.label')).toBe('field-spans-0-label');
});

test('the summary counts in words', () => {
  expect([1, 2, 12].map(countProblems)).toEqual([
    'One thing to put right',
    'Two things to put right',
    '12 things to put right',
  ]);
});

test('a typed number takes a decimal comma and a true minus; nothing typed is nothing', () => {
  expect([readNumber('2,5'), readNumber(' 155 '), readNumber('−4'), readNumber('')]).toEqual([
    2.5,
    155,
    -4,
    null,
  ]);
  expect(readNumber('hot')).toBeNaN();
});
