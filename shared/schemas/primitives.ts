import { z } from 'zod';

// No code is made at run time: the pages' content policy forbids it, and a try alone is reported as a breach.
z.config({ jitless: true });

/** Words that people type: trimmed, bounded, no control characters. */
export function words(most: number) {
  return (
    z
      .string()
      .trim()
      .max(most, `Use at most ${most} characters`)
      // eslint-disable-next-line no-control-regex
      .regex(/^[^\u0000-\u0008\u000b\u000c\u000e-\u001f]*$/, 'Take out the control characters')
  );
}

export function neededWords(most: number, what: string) {
  return words(most).min(1, `Enter ${what}`);
}

export const idSchema = z.uuid();

/** An instant: integer milliseconds since 1970, UTC. */
export const instantSchema = z.int().min(0);

/** A day in the shop's zone, `2026-03-04`. */
export const daySchema = z.iso.date();

export const emailSchema = z
  .email('Enter an e-mail address like name@example.com')
  .max(254)
  .transform((email) => email.toLowerCase());

export const temperatureUnitSchema = z.enum(['F', 'C', 'K']);
export const displayUnitSchema = z.enum(['F', 'C']);

/** What the server answers with whenever it refuses. `fields` names each faulty field in words. */
export const problemSchema = z.object({
  code: z.string(),
  message: z.string(),
  fields: z.record(z.string(), z.string()).optional(),
});
export type Problem = z.infer<typeof problemSchema>;
