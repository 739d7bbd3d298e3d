import request from 'supertest';
import { expect, test } from 'vitest';
import { createTestApp } from '#tests/support/test-app.ts';

const plain = await createTestApp();
const https = await createTestApp({ publicUrl: new URL('https://fusekeeper.example') });
const broken = await createTestApp({
  pages: () => {
    throw new Error('secret of the house');
  },
});

const POLICY = [
  "default-src 'none'",
  "script-src 'self'",
  "connect-src 'self'",
  "img-src 'self' blob:",
  "style-src 'self'",
  "font-src 'self'",
  "worker-src 'self'",
  "manifest-src 'self'",
  "base-uri 'none'",
  "object-src 'none'",
  "form-action 'self'",
  "frame-ancestors 'none'",
  "require-trusted-types-for 'script'",
  'trusted-types fusekeeper-worker',
].join(';');

test('the policy and its companions are on every answer, whatever it says', async () => {
  const owner = await plain.agent('owner');
  const answers = [
    await request(plain.app).get('/api/health').expect(200),
    await owner.post('/api/customers').send({}).expect(400),
    await request(plain.app).get('/api/jobs').expect(401),
    await request(plain.app).post('/api/session').set('Origin', 'http://x.example').expect(403),
    await request(plain.app).get('/api/nothing').expect(404),
    await request(plain.app).get('/nothing').expect(404),
    await request(plain.app).post('/api/session').type('text').send('x').expect(415),
    await owner
      .post('/api/customers')
      .send({ name: 'x'.repeat(200_000) })
      .expect(413),
    await request(broken.app).get('/').expect(500),
  ];

  for (const { headers } of answers) {
    expect(headers).toMatchObject({
      'content-security-policy': POLICY,
      'referrer-policy': 'no-referrer',
      'cross-origin-opener-policy': 'same-origin',
      'cross-origin-resource-policy': 'same-origin',
      'x-content-type-options': 'nosniff',
      'x-robots-tag': 'noindex, nofollow',
      'permissions-policy':
        'bluetooth=(self), serial=(self), camera=(), geolocation=(), microphone=(), payment=()',
    });
    expect(headers).not.toHaveProperty('x-powered-by');
    expect(headers).not.toHaveProperty('strict-transport-security');
  }
});

test('nothing that the API says may be kept', async () => {
  const owner = await plain.agent('owner');

  for (const path of ['/api/health', '/api/session', '/api/nothing']) {
    expect((await owner.get(path)).headers['cache-control']).toBe('no-store');
  }
});

test('over https the browser is told to stay there', async () => {
  const { headers } = await request(https.app).get('/api/health');

  expect(headers['strict-transport-security']).toBe('max-age=31536000');
});
