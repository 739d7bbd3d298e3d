import { resolve } from 'node:path';
import { expect, test } from 'vitest';
import { readEnv } from '#server/env.ts';

test('with nothing set it runs on this machine only, at port 4870, with the demo', () => {
  expect(readEnv({})).toEqual({
    port: 4870,
    host: '127.0.0.1',
    dataDir: resolve('data'),
    publicUrl: null,
    trustedProxy: [],
    development: false,
    demo: true,
    logLevel: 'info',
    owner: { name: undefined, email: undefined, password: undefined },
  });
});

test('every name is read', () => {
  const env = readEnv({
    PORT: '4871',
    HOST: '::1',
    DATA_DIR: '/srv/fusekeeper',
    PUBLIC_URL: 'https://fusekeeper.example/',
    TRUSTED_PROXY: 'loopback, 10.0.0.2,2001:db8::/64',
    NODE_ENV: 'development',
    DEMO: 'no',
    LOG_LEVEL: 'warn',
    OWNER_NAME: 'Mae',
  });

  expect(env).toMatchObject({
    port: 4871,
    host: '::1',
    dataDir: '/srv/fusekeeper',
    trustedProxy: ['127.0.0.0/8', '::1', '10.0.0.2', '2001:db8::/64'],
    development: true,
    demo: false,
    logLevel: 'warn',
    owner: { name: 'Mae' },
  });
  expect(env.publicUrl?.origin).toBe('https://fusekeeper.example');
});

test('an empty value counts as not set', () => {
  expect(readEnv({ PORT: '', DEMO: '', PUBLIC_URL: '' })).toMatchObject({
    port: 4870,
    demo: true,
    publicUrl: null,
  });
});

test('every bad name is told at once', () => {
  const read = () =>
    readEnv({
      PORT: '70000',
      HOST: 'my laptop',
      DEMO: 'perhaps',
      PUBLIC_URL: 'ftp://x',
      NODE_ENV: 'x',
    });

  expect(read).toThrow(/PORT must be 0 to 65535/);
  expect(read).toThrow(/HOST must be an IP address or localhost/);
  expect(read).toThrow(/DEMO must be yes or no/);
  expect(read).toThrow(/PUBLIC_URL must be an http or https address/);
  expect(read).toThrow(/NODE_ENV must be development, production or test/);
});

test('a proxy is an address or a range, never everybody and never a name', () => {
  const wrong = ['yes', '1', 'proxy.example', '10.0.0.0/33', '0.0.0.0/0', '::/0', '10.0.0.2;::1'];
  for (const TRUSTED_PROXY of wrong) {
    const read = () => readEnv({ PUBLIC_URL: 'https://fusekeeper.example', TRUSTED_PROXY });
    expect(read).toThrow(
      /^The environment cannot be used:\n {2}TRUSTED_PROXY must be loopback, or/,
    );
  }
});

test('a proxy without the address that people come by is refused', () => {
  const read = () => readEnv({ TRUSTED_PROXY: 'loopback' });

  expect(read).toThrow(/TRUSTED_PROXY needs a PUBLIC_URL beside it/);
});

test('the public address has no path, since the application stands at the root', () => {
  for (const PUBLIC_URL of [
    'https://a.example/shop',
    'https://a.example/?x',
    'https://me@a.example',
  ]) {
    expect(() => readEnv({ PUBLIC_URL })).toThrow(/PUBLIC_URL must end with the host or the port/);
  }
});
