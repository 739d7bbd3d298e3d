import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { createApp } from './app.ts';
import { seedDemo } from './demo/seed-demo.ts';
import { builtClient, clientFromSource } from './http/client-files.ts';
import { plainHttpWarning } from './http/plain-http-warning.ts';
import { migrate, openDatabase } from './db.ts';
import { readEnv } from './env.ts';
import { createLogger } from './log.ts';
import { closeWorkers, openWorkers } from './pool.ts';
import { openDataFolders } from './runs/data-folders.ts';
import { createSampleRepository } from './runs/sample-repository.ts';
import { openSecrets } from './secrets.ts';

/** An upload of 100 MB over a phone takes minutes; a request that says nothing for so long is dropped. */
const HEADERS_MS = 60_000;
const REQUEST_MS = 300_000;
/** What is under way gets this long to end when the server is told to stop. */
const CLOSING_MS = 10_000;

async function start(): Promise<void> {
  const env = readEnv();
  const logger = createLogger(undefined, env.logLevel);
  const secrets = await openSecrets(env.dataDir);
  const db = openDatabase(join(env.dataDir, 'fusekeeper.sqlite'));
  await migrate(db);
  await createSampleRepository(db).sweep();
  await openDataFolders(env.dataDir);
  const workers = openWorkers();
  const now = () => new Date();

  const server = createServer({ headersTimeout: HEADERS_MS, requestTimeout: REQUEST_MS });
  const client = env.development ? await clientFromSource(server) : builtClient();
  const { pages } = client;
  const { dataDir, publicUrl, trustedProxy, development } = env;
  const outside = { publicUrl, trustedProxy, pages, development };
  const parts = { db, dataDir, now, workers, secrets, logger, ...outside };
  const tokens = env.demo ? await seedDemo(parts) : null;
  server.on('request', createApp(parts));

  server.listen(env.port, env.host);
  // Rejects where the port is taken.
  await once(server, 'listening');
  const url = publicUrl?.origin ?? localUrl(server.address());
  process.stdout.write(`Fusekeeper is at ${url}\n`);
  process.stderr.write(plainHttpWarning(env));
  // Told at the first start and never again: only a hash of it is kept.
  for (const token of tokens ?? []) {
    process.stdout.write(`A customer of the demo shop opens ${url}/shared#${token}\n`);
  }
  const close = () => {
    setTimeout(() => server.closeAllConnections(), CLOSING_MS).unref();
    server.close(() => {
      void closeWorkers(workers)
        .then(() => db.destroy())
        .then(() => process.exit(0));
    });
    server.closeIdleConnections();
    void client.close();
  };
  process.once('SIGTERM', close).once('SIGINT', close);
}

function localUrl(address: AddressInfo | string | null): string {
  if (address === null || typeof address === 'string') return 'an unknown address';
  const isLoopback = address.address === '127.0.0.1' || address.address === '::1';
  const host = address.family === 'IPv6' ? `[${address.address}]` : address.address;
  return `http://${isLoopback ? 'localhost' : host}:${address.port}`;
}

start().catch((error: unknown) => {
  const message = error instanceof Error ? error.message : String(error);
  process.stderr.write(`Fusekeeper did not start. ${message}\n`);
  process.exit(1);
});
