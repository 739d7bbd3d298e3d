import fc from 'fast-check';
import { expect, test } from 'vitest';
import { newCustomerSchema } from '#shared/schemas/homes.ts';
import { bookVisit } from '#tests/support/booked-visit.ts';
import { createTestApp } from '#tests/support/test-app.ts';

const app = await createTestApp();
const owner = await app.agent('owner');
const { visit } = await bookVisit(owner, await app.agent('technician'));

/** Bits of other languages, which must stay text wherever they are put. */
const PAYLOADS = [
  "'; drop table customers; --",
  "' or '1'='1",
  '") or 1=1 --',
  '<script>alert(1)</script>',
  '{{7*7}} ${7*7}',
  '../../etc/passwd',
  'a\r\nSet-Cookie: x=1',
  '=cmd|calc!A0',
  '__proto__',
  '\u202Egnp.exe',
  '%00%0a',
  '🧺\u0301\u200d',
];
const text = fc.oneof(fc.constantFrom(...PAYLOADS), fc.string({ unit: 'binary', maxLength: 60 }));

test('whatever is typed into a customer comes back as typed, or is refused by its field', async () => {
  const customer = fc.record({ name: text, phone: text, email: text, notes: text });

  await fc.assert(
    fc.asyncProperty(customer, async (typed) => {
      const answer = await owner.post('/api/customers').send(typed);
      const rule = newCustomerSchema.safeParse(JSON.parse(JSON.stringify(typed)));
      expect(answer.status).toBe(rule.success ? 201 : 400);
      if (!rule.success) {
        const faulty = [...new Set(rule.error.issues.map((issue) => issue.path.join('.')))];
        expect(Object.keys(answer.body.fields).toSorted()).toEqual(faulty.toSorted());
        return;
      }
      const { body } = await owner.get(`/api/customers/${answer.body.id}`);
      expect(body).toEqual({ ...rule.data, id: answer.body.id });
    }),
    { numRuns: 60 },
  );
}, 60_000);

test('whatever is looked for, the search answers with a list and changes nothing', async () => {
  const before = await app.db('jobs');

  await fc.assert(
    fc.asyncProperty(text, async (words) => {
      const answer = await owner.get('/api/jobs').query({ find: words });
      expect([200, 400]).toContain(answer.status);
      if (answer.status === 200) expect(Array.isArray(answer.body)).toBe(true);
    }),
    { numRuns: 60 },
  );
  expect(await app.db('jobs')).toEqual(before);
}, 60_000);

test('whatever stands where an id belongs names nothing', async () => {
  for (const payload of PAYLOADS) {
    for (const noun of ['customers', 'homes', 'machines', 'jobs', 'visits', 'runs']) {
      const path = `/api/${noun}/${encodeURIComponent(payload)}`;
      expect([path, (await owner.get(path)).status]).toEqual([path, 404]);
    }
  }
});

test('a body of the wrong shape is a refusal, never a defect', async () => {
  const shapes = [null, 0, 'x', [], [[]], { machineId: {} }, { state: ['closed'] }, { name: 5 }];
  const routes = ['/api/jobs', '/api/customers', '/api/homes', '/api/machines', '/api/ratings'];

  for (const path of [...routes, '/api/probes', '/api/people', `/api/jobs/${visit.jobId}/visits`]) {
    for (const shape of shapes) {
      const answer = await owner.post(path).type('json').send(JSON.stringify(shape));
      expect([path, shape, answer.status]).toEqual([path, shape, 400]);
    }
  }
});
