import { chmod, mkdtemp, rm, stat, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { openSecrets } from '#server/secrets.ts';

let parent: string;

beforeEach(async () => {
  parent = await mkdtemp(join(tmpdir(), 'fusekeeper-secrets-'));
});

afterEach(async () => {
  await rm(parent, { recursive: true });
});

async function modeOf(path: string): Promise<string> {
  return ((await stat(path)).mode & 0o777).toString(8);
}

test('secrets are made once, in a folder that only its owner may open', async () => {
  const folder = join(parent, 'data');

  const first = await openSecrets(folder);
  const second = await openSecrets(folder);

  expect(second.pepper.equals(first.pepper)).toBe(true);
  expect(second.tokenKey.equals(first.tokenKey)).toBe(true);
  // HS256 wants a key no shorter than its hash: RFC 7518, 3.2.
  expect(first.tokenKey.symmetricKeySize).toBeGreaterThanOrEqual(32);
  expect(first.pepper.equals(first.tokenKey.export())).toBe(false);
  expect(await modeOf(folder)).toBe('700');
  expect(await modeOf(join(folder, 'token-key'))).toBe('600');
  expect(await modeOf(join(folder, 'password-pepper'))).toBe('600');
});

test('a folder left open to others is closed', async () => {
  await chmod(parent, 0o755);

  await openSecrets(parent);

  expect(await modeOf(parent)).toBe('700');
});

test('a damaged secret is told, not replaced', async () => {
  await writeFile(join(parent, 'token-key'), 'short');

  await expect(openSecrets(parent)).rejects.toThrow(/token-key is damaged/);
});
