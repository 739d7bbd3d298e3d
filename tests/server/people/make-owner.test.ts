import { randomBytes } from 'node:crypto';
import type { Knex } from 'knex';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { migrate, openDatabase } from '#server/db.ts';
import { makeOwner } from '#server/people/make-owner.ts';
import { compareNow, prehash } from '#server/people/password-hash.ts';

const pepper = randomBytes(48);
const now = () => new Date('2026-03-04T15:00:00Z');
const asked = { name: 'Mae Harrow', email: 'Mae@x.example', password: 'a kettle of blue smoke' };
let db: Knex;

beforeEach(async () => {
  db = openDatabase(':memory:');
  await migrate(db);
});

afterEach(() => db.destroy());

test('an empty installation gets its first owner and its shop', async () => {
  const owner = await makeOwner(db, pepper, { asked, now, zone: 'Europe/Dublin' });

  const [row] = await db('users');
  expect(row).toMatchObject({ id: owner.id, email: 'mae@x.example', role: 'owner' });
  expect(compareNow(prehash(asked.password, pepper), row.password_hash)).toBe(true);
  expect(compareNow(prehash(asked.password, randomBytes(48)), row.password_hash)).toBe(false);
  expect(await db('shop')).toMatchObject([{ name: 'Our shop', zone: 'Europe/Dublin', is_demo: 0 }]);
  expect(await db('audit_log')).toMatchObject([{ event: 'user_created', subject: owner.id }]);
});

test('where there is an owner no other is made this way', async () => {
  await makeOwner(db, pepper, { asked, now, zone: 'UTC' });

  const second = makeOwner(db, pepper, {
    asked: { ...asked, email: 'b@x.example' },
    now,
    zone: 'UTC',
  });

  await expect(second).rejects.toMatchObject({ status: 409, code: 'owner-exists' });
  expect(await db('users')).toHaveLength(1);
});

test('a weak password makes nobody', async () => {
  const weak = makeOwner(db, pepper, { asked: { ...asked, password: 'short' }, now, zone: 'UTC' });

  await expect(weak).rejects.toMatchObject({ fields: { password: 'Use at least 12 characters' } });
  expect([await db('users'), await db('shop')]).toEqual([[], []]);
});
