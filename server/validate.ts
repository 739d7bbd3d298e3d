import type { z } from 'zod';
import { AppError } from './errors.ts';
import type { Fields } from './errors.ts';

/** The value as the schema types it, or a 400 that names each faulty field in words. */
export function validate<Schema extends z.ZodType>(
  schema: Schema,
  value: unknown,
): z.output<Schema> {
  const parsed = schema.safeParse(value ?? {}, { error: inWords });
  if (parsed.success) return parsed.data;

  const fields: Fields = {};
  for (const { path, message } of parsed.error.issues) fields[path.join('.')] ??= message;
  throw new AppError(400, 'fields', 'Some of this needs another look.', fields);
}

/** Words for the faults that the schema itself has no message for. */
function inWords(issue: z.core.$ZodRawIssue): string {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined ? 'This is missing' : `This must be ${a(issue.expected)}`;
    case 'invalid_value':
      return 'Choose one of the list';
    case 'invalid_format':
      return 'This is not written as it must be';
    case 'too_small':
      return `At least ${issue.minimum}`;
    case 'too_big':
      return `At most ${issue.maximum}`;
    case 'unrecognized_keys':
      return `There is no such field: ${issue.keys.join(', ')}`;
    default:
      return 'This cannot be understood';
  }
}

function a(type: string): string {
  const names: Record<string, string> = {
    string: 'text',
    number: 'a number',
    int: 'a whole number',
    boolean: 'yes or no',
    array: 'a list',
  };
  return names[type] ?? 'something else';
}
