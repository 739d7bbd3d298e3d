import { expect, test } from 'vitest';
import { plainHttpWarning } from '#server/http/plain-http-warning.ts';

const HTTPS = new URL('https://fusekeeper.example');

test('who lets other machines in without https is told what it costs', () => {
  const open = [
    { host: '0.0.0.0', publicUrl: null },
    { host: '::', publicUrl: null },
    { host: '10.0.0.2', publicUrl: new URL('http://fusekeeper.example') },
    // Only this machine is listened to, but a proxy lets others in.
    { host: '127.0.0.1', publicUrl: new URL('http://fusekeeper.example') },
    { host: '127.0.0.1', publicUrl: new URL('http://127.example') },
  ];

  for (const how of open) {
    expect([how, plainHttpWarning(how)]).toEqual([
      how,
      expect.stringMatching(/^Warning: .* plain http\. .*https.*\n$/),
    ]);
  }
});

test('on this machine only, or with https in front, nothing is said', () => {
  const fine = [
    { host: '127.0.0.1', publicUrl: null },
    { host: '::1', publicUrl: null },
    { host: 'localhost', publicUrl: new URL('http://localhost:4870') },
    { host: '127.0.0.1', publicUrl: new URL('http://[::1]:4870') },
    { host: '127.0.0.1', publicUrl: HTTPS },
    { host: '0.0.0.0', publicUrl: HTTPS },
  ];

  for (const how of fine) expect([how, plainHttpWarning(how)]).toEqual([how, '']);
});
