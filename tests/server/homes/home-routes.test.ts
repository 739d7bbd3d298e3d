import { randomUUID } from 'node:crypto';
import { expect, test } from 'vitest';
import { homeListSchema } from '#shared/schemas/homes.ts';
import { createTestApp } from '#tests/support/test-app.ts';

const app = await createTestApp();
const office = await app.agent('office');

const ida = {
  name: 'Ida Penn',
  phone: '555-0117',
  email: 'ida@penn.example',
  notes: 'Rings first',
};

async function newCustomer(name = ida.name): Promise<string> {
  return (
    await office
      .post('/api/customers')
      .send({ ...ida, name })
      .expect(201)
  ).body.id;
}

test('a customer is added, read, changed and listed by name', async () => {
  const added = await office.post('/api/customers').send(ida);
  const url = `/api/customers/${added.body.id}`;
  const other = await newCustomer('Abel Stone');

  expect(added.body).toEqual({ ...ida, id: expect.any(String) });
  expect((await office.get(url)).body).toEqual(added.body);
  const changed = await office.put(url).send({ ...ida, phone: '555-0118' });
  expect(changed.body).toEqual({ ...added.body, phone: '555-0118' });
  const listed: { id: string }[] = (await office.get('/api/customers')).body;
  expect(listed.map(({ id }) => id)).toEqual([other, added.body.id]);
});

test('a home tells whose it is and what stands there', async () => {
  const customerId = await newCustomer();
  const asked = { customerId, address: '9 Weir Row', town: 'Tessford', accessNotes: 'Side door' };

  const added = await office.post('/api/homes').send(asked);
  const home = await office.get(`/api/homes/${added.body.id}`);

  expect(added.status).toBe(201);
  expect(added.body).toEqual({ ...asked, id: expect.any(String) });
  expect(home.body).toEqual({ ...added.body, customer: { ...ida, id: customerId }, machines: [] });
  expect(homeListSchema.parse((await office.get('/api/homes')).body)).toContainEqual(home.body);
});

test('a home can move to another customer', async () => {
  const [seller, buyer] = [await newCustomer('Seller'), await newCustomer('Buyer')];
  const asked = { address: '1 Quay', town: 'Tessford', accessNotes: '' };
  const home = await office.post('/api/homes').send({ ...asked, customerId: seller });

  const changed = await office
    .put(`/api/homes/${home.body.id}`)
    .send({ ...asked, customerId: buyer });

  expect(changed.body).toMatchObject({ id: home.body.id, customer: { id: buyer, name: 'Buyer' } });
});

test('a home needs an address and a customer who is there', async () => {
  const answer = await office
    .post('/api/homes')
    .send({ customerId: 'someone', address: ' ', town: '', accessNotes: '' });
  const stranger = await office
    .post('/api/homes')
    .send({ customerId: randomUUID(), address: '1 Quay', town: '', accessNotes: '' });

  expect(answer.body.fields).toMatchObject({
    customerId: expect.any(String),
    address: 'Enter an address',
  });
  expect(stranger.body).toMatchObject({
    code: 'fields',
    fields: { customerId: 'Choose a customer' },
  });
});

test('what is not there is told so', async () => {
  const home = { customerId: await newCustomer(), address: '1 Quay', town: '', accessNotes: '' };
  for (const id of [randomUUID(), 'new', '1; drop table homes']) {
    await office.get(`/api/homes/${id}`).expect(404);
    await office.put(`/api/homes/${id}`).send(home).expect(404);
    await office.get(`/api/customers/${id}`).expect(404);
    await office.put(`/api/customers/${id}`).send(ida).expect(404);
  }
});

test('words are kept as typed, but for the space around them', async () => {
  const odd = `O’Hara "& Sons" <b>'; drop table customers; -- 🧺`;

  const added = await office.post('/api/customers').send({ ...ida, name: `  ${odd} ` });
  const control = await office.post('/api/customers').send({ ...ida, name: 'bell\u0007' });

  expect((await office.get(`/api/customers/${added.body.id}`)).body.name).toBe(odd);
  expect(control.body.fields).toEqual({ name: 'Take out the control characters' });
});
