import { join } from 'node:path';
import { createInterface } from 'node:readline/promises';
import { Writable } from 'node:stream';
import { migrate, openDatabase } from '#server/db.ts';
import { readEnv } from '#server/env.ts';
import { AppError } from '#server/errors.ts';
import { makeOwner } from '#server/people/make-owner.ts';
import type { OwnerAsked } from '#server/people/make-owner.ts';
import { openSecrets } from '#server/secrets.ts';

/** `npm run owner`: the first owner of an installation that started empty (DEMO=no). */
async function run(): Promise<void> {
  const env = readEnv();
  const { pepper } = await openSecrets(env.dataDir);
  const db = openDatabase(join(env.dataDir, 'fusekeeper.sqlite'));
  try {
    await migrate(db);
    const zone = new Intl.DateTimeFormat().resolvedOptions().timeZone;
    const now = () => new Date();
    const owner = await makeOwner(db, pepper, { asked: await ask(env.owner), now, zone });
    console.log(`${owner.name} owns the shop. Start Fusekeeper and sign in as ${owner.email}.`);
  } finally {
    await db.destroy();
  }
}

/** What the environment does not give is asked for; the password is not shown. */
async function ask(given: Partial<Record<keyof OwnerAsked, string | undefined>>) {
  const { name, email, password } = given;
  if (name !== undefined && email !== undefined && password !== undefined) {
    return { name, email, password };
  }
  if (!process.stdin.isTTY) {
    throw new Error('Run this in a terminal, or set OWNER_NAME, OWNER_EMAIL and OWNER_PASSWORD.');
  }
  const screen = new QuietScreen();
  const lines = createInterface({
    input: process.stdin,
    output: screen,
    terminal: true,
  });
  try {
    return {
      name: name ?? (await lines.question('Name: ')),
      email: email ?? (await lines.question('E-mail: ')),
      password: password ?? (await screen.hiding(() => lines.question('Password: '))),
    };
  } finally {
    lines.close();
  }
}

/** Writes what is asked and typed, but for a password. */
class QuietScreen extends Writable {
  private isQuiet = false;

  override _write(chunk: Buffer, _encoding: string, done: () => void): void {
    if (!this.isQuiet) process.stdout.write(chunk);
    done();
  }

  async hiding(question: () => Promise<string>): Promise<string> {
    const answer = question();
    this.isQuiet = true;
    const typed = await answer;
    this.isQuiet = false;
    process.stdout.write('\n');
    return typed;
  }
}

run().catch((error: unknown) => {
  const words = error instanceof Error ? error.message : String(error);
  const fields = error instanceof AppError ? Object.entries(error.fields ?? {}) : [];
  console.error([words, ...fields.map(([name, fault]) => `  ${name}: ${fault}`)].join('\n'));
  process.exitCode = 1;
});
