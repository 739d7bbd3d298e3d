import { readFile, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { FINDING_CODES } from '#shared/analysis/analysis.ts';
import { makeSampleLogs, STORIES } from '#server/commands/heat-model/sample-logs.ts';

const folder = join(import.meta.dirname, '../../../../sample-logs');

test('the sample logs in the tree are those that the command writes, byte for byte', async () => {
  for (const { name, bytes } of makeSampleLogs()) {
    const kept = await readFile(join(folder, name));

    expect(kept.equals(bytes), name).toBe(true);
  }
});

test('no other file lies among the sample logs', async () => {
  const written = makeSampleLogs().map(({ name }) => name);

  expect((await readdir(folder)).sort()).toEqual([...written, 'README.md'].sort());
});

test('every sample log is small', () => {
  for (const { bytes } of makeSampleLogs()) expect(bytes.length).toBeLessThan(150_000);
});

test('every finding code is the headline of a sample log', () => {
  const told = new Set(STORIES.map(({ headline }) => headline));

  expect(FINDING_CODES.filter((code) => !told.has(code))).toEqual([]);
});

test('the README names every sample log', async () => {
  const readme = await readFile(join(folder, 'README.md'), 'utf8');

  for (const { file } of STORIES) expect(readme).toContain(file);
});
