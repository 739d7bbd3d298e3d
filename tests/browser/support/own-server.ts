import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { cp, mkdtemp, rm, symlink } from 'node:fs/promises';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';

/**
 * A built server of the test's own, with the demo shop, that may be killed and started again at the same address.
 *
 * @param built the folder that the build lies in
 */
export async function ownServer(built = process.env['FK_BUILT'] ?? 'dist') {
  const folder = await mkdtemp(join(tmpdir(), 'fusekeeper-own-'));
  // A copy of the program, since a test may lay another version over it.
  await cp(built, join(folder, 'dist'), { recursive: true });
  for (const name of ['node_modules', 'sample-logs', 'package.json']) {
    await symlink(resolve(name), join(folder, name));
  }
  const port = await freePort();
  const url = `http://127.0.0.1:${port}`;
  let child: ChildProcess | undefined;

  /** `settings`: laid over its own; again at each start. */
  async function start(settings: Record<string, string> = {}): Promise<void> {
    const started = spawn(process.execPath, [join(folder, 'dist/server/index.js')], {
      env: {
        PATH: process.env['PATH'],
        DATA_DIR: join(folder, 'data'),
        PORT: String(port),
        LOG_LEVEL: 'warn',
        ...settings,
      },
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    child = started;
    // Not left behind, whatever ends the test.
    const endIt = () => started.kill('SIGKILL');
    process.once('exit', endIt);
    started.once('exit', () => process.off('exit', endIt));
    let said = '';
    started.stdout.on('data', (chunk: Buffer) => (said += chunk.toString()));
    while (!said.includes('Fusekeeper is at')) {
      if (started.exitCode !== null || started.signalCode !== null)
        throw new Error(`the server did not start: ${said}`);
      await Promise.race([once(started.stdout, 'data'), once(started, 'exit')]);
    }
  }

  function isUp(): boolean {
    return child !== undefined && child.exitCode === null && child.signalCode === null;
  }

  async function kill(): Promise<void> {
    if (!child || !isUp()) return;
    child.kill('SIGKILL');
    await once(child, 'exit');
  }

  return {
    url,
    /** The built application that this server hands out. */
    clientFolder: join(folder, 'dist/client'),
    dataFolder: join(folder, 'data'),
    start,
    isUp,
    /** As a power cut would: nothing is ended in good order. */
    kill,
    async remove(): Promise<void> {
      await kill();
      await rm(folder, { recursive: true, force: true });
    },
  };
}

export async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  server.close();
  await once(server, 'close');
  if (address === null || typeof address === 'string') throw new Error('no free port');
  return address.port;
}
