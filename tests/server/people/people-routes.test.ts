import { beforeEach, expect, test } from 'vitest';
import { createTestApp, NOW, TEST_SHOP, type Agent } from '#tests/support/test-app.ts';

const app = await createTestApp();
let owner: Agent;

beforeEach(async () => {
  for (const table of ['audit_log', 'sessions', 'users']) await app.db(table).delete();
  owner = await app.agent('owner', 'Mae Harrow');
});

const lou = {
  name: ' Lou Field ',
  email: 'Lou@HarrowLane.example',
  role: 'technician',
  password: 'a kettle of blue smoke',
};

test('the owner adds a person, whose password is nowhere to be seen', async () => {
  const added = await owner.post('/api/people').send(lou);
  const people = await owner.get('/api/people');

  expect(added.status).toBe(201);
  expect(added.body).toEqual({
    id: expect.any(String),
    name: 'Lou Field',
    email: 'lou@harrowlane.example',
    role: 'technician',
    disabledAtMs: null,
  });
  expect(people.body).toEqual([added.body, owner.person]);
  const [row] = await app.db('users').where({ id: added.body.id });
  expect(row.password_hash).toMatch(/^\$2[aby]\$12\$.{53}$/);
  expect(await app.db('audit_log')).toMatchObject([
    { at_ms: NOW.getTime(), user_id: owner.person.id, event: 'user_created', subject: row.id },
  ]);
});

test('two people cannot have one address', async () => {
  await owner.post('/api/people').send({ ...lou, email: owner.person.email.toUpperCase() });

  const second = await owner.post('/api/people').send({ ...lou, email: owner.person.email });

  expect(second.status).toBe(409);
  expect(second.body.fields).toEqual({ email: 'Somebody has this address' });
  expect(await app.db('users')).toHaveLength(1);
});

test('what is wrong with a new person is said field by field', async () => {
  const answer = await owner
    .post('/api/people')
    .send({ name: ' ', email: 'lou', role: 'boss', password: 'short' });

  expect(answer.status).toBe(400);
  expect(answer.body).toEqual({
    code: 'fields',
    message: 'Some of this needs another look.',
    fields: {
      name: 'Enter a name',
      email: 'Enter an e-mail address like name@example.com',
      role: 'Choose one of the list',
      password: 'Use at least 12 characters',
    },
  });
});

test('a field that is nobody’s to set is not set', async () => {
  const extra = { id: owner.person.id, disabledAtMs: 5, disabled_at_ms: 5, createdAtMs: 5 };
  const added = await owner.post('/api/people').send({ ...lou, ...extra });

  expect(added.body).toMatchObject({ disabledAtMs: null });
  expect(added.body.id).not.toBe(owner.person.id);
});

test('an owner can disable others, never themselves', async () => {
  const technician = await app.agent('technician');

  const disabled = await owner.post(`/api/people/${technician.person.id}/disable`);
  const self = await owner.post(`/api/people/${owner.person.id}/disable`);
  const enabled = await owner.post(`/api/people/${technician.person.id}/enable`);

  expect(disabled.body.disabledAtMs).toBe(NOW.getTime());
  expect(self.status).toBe(409);
  expect(enabled.body.disabledAtMs).toBeNull();
  expect(await app.db('audit_log').pluck('event')).toEqual(['user_disabled', 'user_enabled']);
});

test('whoever can be sent on a visit is listed, technicians first, the disabled not at all', async () => {
  const office = await app.agent('office');
  const [tom, abe] = [await app.agent('technician', 'Tom'), await app.agent('technician', 'Abe')];
  const gone = await app.agent('technician', 'Gone');
  await owner.post(`/api/people/${gone.person.id}/disable`);

  const { body } = await office.get('/api/technicians');

  expect(body).toEqual([abe, tom, owner].map(({ person: { id, name } }) => ({ id, name })));
});

test('a refusal by role is on record', async () => {
  const technician = await app.agent('technician');
  await technician.get('/api/people').expect(403);

  expect(await app.db('audit_log')).toMatchObject([
    { user_id: technician.person.id, event: 'authz_fail', subject: 'GET /people' },
  ]);
});

test('the owner changes the shop, and everybody sees it', async () => {
  const change = { ...TEST_SHOP, name: 'Harrow Lane', zone: 'Europe/Dublin', unit: 'C' };
  const technician = await app.agent('technician');

  const changed = await owner.put('/api/shop').send(change);

  expect(changed.body).toEqual(change);
  expect((await technician.get('/api/shop')).body).toEqual(change);
  expect((await technician.get('/api/session')).body.shop).toEqual(change);
  expect((await technician.get('/api/shop-card')).body).toEqual({
    name: 'Harrow Lane',
    town: 'Tessford',
  });
  await owner.put('/api/shop').send(TEST_SHOP).expect(200);
});

test('a time zone that no clock knows is refused', async () => {
  const answer = await owner.put('/api/shop').send({ ...TEST_SHOP, zone: 'Tessford/Mill' });

  expect(answer.body.fields).toEqual({ zone: 'Enter a time zone such as America/New_York' });
  expect((await owner.get('/api/shop')).body).toEqual(TEST_SHOP);
});
