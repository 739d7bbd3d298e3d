import { expect, test } from 'vitest';
import { z } from 'zod';
import { validate } from '#server/validate.ts';

const schema = z.object({
  name: z.string().min(1, 'Enter a name'),
  count: z.int().max(9),
  kind: z.enum(['a', 'b']),
  spans: z.array(z.object({ fromS: z.number() })),
});
const right = { name: 'x', count: 1, kind: 'a', spans: [] };

function fieldsOf(value: unknown): unknown {
  try {
    return validate(schema, value);
  } catch (error) {
    return error instanceof Error && 'fields' in error ? error.fields : error;
  }
}

test('what fits comes back typed, and no more than was asked for', () => {
  expect(fieldsOf({ ...right, isOwner: true })).toEqual(right);
});

test('every faulty field is named in words, by its path', () => {
  expect(
    fieldsOf({ name: '', count: 10, kind: 'c', spans: [{ fromS: 0 }, { fromS: '1' }] }),
  ).toEqual({
    name: 'Enter a name',
    count: 'At most 9',
    kind: 'Choose one of the list',
    'spans.1.fromS': 'This must be a number',
  });
});

test('nothing at all is an empty form', () => {
  const missing = 'This is missing';
  const all = { name: missing, count: missing, kind: 'Choose one of the list', spans: missing };

  expect(fieldsOf(undefined)).toEqual(all);
  expect(fieldsOf(null)).toEqual(all);
});
