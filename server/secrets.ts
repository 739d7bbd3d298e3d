import { createSecretKey, randomBytes } from 'node:crypto';
import type { KeyObject } from 'node:crypto';
import { chmod, mkdir, readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';

/** Made at the first start, kept in the data folder, readable by its owner only. */
export type Secrets = { tokenKey: KeyObject; pepper: Buffer };

const SECRET_BYTES = 48;

export async function openSecrets(dataDir: string): Promise<Secrets> {
  await mkdir(dataDir, { recursive: true, mode: 0o700 });
  await chmod(dataDir, 0o700);
  return {
    tokenKey: createSecretKey(await readOrMake(join(dataDir, 'token-key'))),
    pepper: await readOrMake(join(dataDir, 'password-pepper')),
  };
}

async function readOrMake(path: string): Promise<Buffer> {
  try {
    const text = randomBytes(SECRET_BYTES).toString('base64');
    // wx: of two first starts at once, one makes it and the other reads it.
    await writeFile(path, text, { mode: 0o600, flag: 'wx' });
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'EEXIST')) throw error;
  }
  await chmod(path, 0o600);
  const secret = Buffer.from(await readFile(path, 'utf8'), 'base64');
  if (secret.length !== SECRET_BYTES)
    throw new Error(`${path} is damaged: restore it from a backup.`);
  return secret;
}
