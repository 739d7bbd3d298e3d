import { expect, test } from 'vitest';
import { newId, uuidOf } from '#client/device/new-id.ts';
import { idSchema } from '#shared/schemas/primitives.ts';

test('octets become a version 4 UUID in the layout of RFC 9562', () => {
  // Section 4.2: version 0b0100 in octet 6, variant 0b10 in octet 8; all other bits as they are.
  expect(uuidOf(new Uint8Array(16))).toBe('00000000-0000-4000-8000-000000000000');
  expect(uuidOf(new Uint8Array(16).fill(255))).toBe('ffffffff-ffff-4fff-bfff-ffffffffffff');
});

test('an id is one that the server takes', () => {
  expect(idSchema.safeParse(newId()).success).toBe(true);
});
