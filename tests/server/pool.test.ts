import { expect, test } from 'vitest';
import { closeWorkers, openWorkers } from '#server/pool.ts';

test('from source, as in development, a worker of TypeScript takes tasks', async () => {
  const workers = openWorkers();

  const hash: unknown = await workers.passwords.run({ do: 'hash', prehash: 'a'.repeat(44) });

  // The form of bcrypt's answer: version, cost, 22 of salt and 31 of hash.
  expect(hash).toMatch(/^\$2[aby]\$\d\d\$[./A-Za-z0-9]{53}$/);
  await closeWorkers(workers);
});
