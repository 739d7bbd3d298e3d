import { spawnSync } from 'node:child_process';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';
import { openDatabase } from '#server/db.ts';
import { compareNow, prehash } from '#server/people/password-hash.ts';
import { openSecrets } from '#server/secrets.ts';

const folder = await mkdtemp(join(tmpdir(), 'fusekeeper-owner-'));
afterAll(() => rm(folder, { recursive: true }));
const PASSWORD = 'a kettle of blue smoke';
const PATIENCE_MS = 60_000;

/** The command from source, as a script runs it. */
function makeOwner(env: Record<string, string>) {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', 'tsx', 'server/commands/make-owner.ts'],
    {
      cwd: new URL('../../../', import.meta.url),
      env: { PATH: process.env['PATH'], DATA_DIR: folder, ...env },
      encoding: 'utf8',
    },
  );
  return { status, stdout, stderr };
}

test(
  'a script makes the first owner, and no second one',
  async () => {
    const given = { OWNER_NAME: 'Mae Harrow', OWNER_EMAIL: 'mae@x.example' };

    const unasked = makeOwner(given);
    const weak = makeOwner({ ...given, OWNER_PASSWORD: 'short' });
    const made = makeOwner({ ...given, OWNER_PASSWORD: PASSWORD });
    const again = makeOwner({ ...given, OWNER_PASSWORD: PASSWORD });

    expect(unasked).toMatchObject({ status: 1, stderr: expect.stringMatching(/^Run this in a/) });
    expect(weak).toEqual({
      status: 1,
      stdout: '',
      stderr: 'Some of this needs another look.\n  password: Use at least 12 characters\n',
    });
    expect(made).toEqual({
      status: 0,
      stdout: 'Mae Harrow owns the shop. Start Fusekeeper and sign in as mae@x.example.\n',
      stderr: '',
    });
    expect(again).toMatchObject({ status: 1, stderr: expect.stringMatching(/^There is an owner/) });
    const db = openDatabase(join(folder, 'fusekeeper.sqlite'));
    const users = await db('users');
    await db.destroy();
    const { pepper } = await openSecrets(folder);
    expect(users).toMatchObject([{ name: 'Mae Harrow', role: 'owner' }]);
    expect(compareNow(prehash(PASSWORD, pepper), users[0].password_hash)).toBe(true);
  },
  PATIENCE_MS,
);
