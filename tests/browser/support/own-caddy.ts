import { spawn, spawnSync, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { access, mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { freePort } from './own-server.ts';

/** Debian's packages; `npm test` installs them where it runs as root. */
export const HOW_TO_GET_CADDY = 'sudo apt-get install caddy libnss3-tools';
const START_WITHIN_MS = 30_000;

export function hasCaddy(): boolean {
  return ['caddy', 'certutil'].every((name) => spawnSync(name, ['--help']).error === undefined);
}

/**
 * Caddy of the test's own on this machine only, from the Caddyfile that README.md gives a shop, with
 * a certificate authority of its own, which `home` trusts: who runs with it as HOME is a phone that
 * the root certificate was put on.
 */
export async function ownCaddy(serverUrl: string) {
  const folder = await mkdtemp(join(tmpdir(), 'fusekeeper-caddy-'));
  const port = await freePort();
  const { caddyfile, name } = await fromReadme(new URL(serverUrl).host);
  await writeFile(join(folder, 'Caddyfile'), `${await head(port)}\n${caddyfile}`);
  const kept = join(folder, 'data/caddy');
  let child: ChildProcess | undefined;

  async function start(): Promise<void> {
    const env = {
      PATH: process.env['PATH'],
      HOME: folder,
      XDG_DATA_HOME: join(folder, 'data'),
      XDG_CONFIG_HOME: join(folder, 'config'),
    };
    const args = ['run', '--config', join(folder, 'Caddyfile'), '--adapter', 'caddyfile'];
    const started = spawn('caddy', args, { env, stdio: ['ignore', 'ignore', 'pipe'] });
    child = started;
    let said = '';
    started.stderr.on('data', (chunk: Buffer) => (said += chunk.toString()));
    const patience = AbortSignal.timeout(START_WITHIN_MS);
    while (!said.includes('serving initial configuration')) {
      if (started.exitCode !== null) throw new Error(`caddy ended: ${said}`);
      await once(started.stderr, 'data', { signal: patience });
    }
  }

  async function stop(): Promise<void> {
    if (!child || child.exitCode !== null || child.signalCode !== null) return;
    child.kill('SIGKILL');
    await once(child, 'exit');
  }

  return {
    /** Where a phone finds the shop; nothing but this browser's own map leads there. */
    url: `https://${name}`,
    hostRule: `MAP ${name} 127.0.0.1:${port}`,
    home: folder,
    start,
    stop,
    async trustRoot(): Promise<void> {
      // The name's own certificate is made last.
      await untilThere(join(kept, `certificates/local/${name}/${name}.crt`));
      await trust(folder, join(kept, 'pki/authorities/local/root.crt'));
    },
    async remove(): Promise<void> {
      await stop();
      await rm(folder, { recursive: true, force: true });
    },
  };
}

/** What keeps a test's caddy to itself: its own port, this machine only, nothing installed, no plain http. */
async function head(httpsPort: number): Promise<string> {
  return `{
	admin off
	skip_install_trust
	auto_https disable_redirects
	default_bind 127.0.0.1
	http_port ${await freePort()}
	https_port ${httpsPort}
}`;
}

/** The block of README.md as it stands there, but for where the server listens. */
async function fromReadme(serverHost: string) {
  const readme = await readFile('README.md', 'utf8');
  const [, indent = '', text] = /^( *)```caddyfile\n([^`]+)```/m.exec(readme) ?? [];
  const block = text?.replaceAll(new RegExp(`^${indent}`, 'gm'), '');
  const name = block && /^(\S+) \{$/m.exec(block)?.[1];
  if (!name || !block.includes('127.0.0.1:4870') || !block.includes('\ttls internal\n')) {
    throw new Error('README.md has no Caddyfile with its own certificates for 127.0.0.1:4870');
  }
  return { caddyfile: block.replace('127.0.0.1:4870', serverHost), name };
}

async function untilThere(file: string): Promise<void> {
  const patience = AbortSignal.timeout(START_WITHIN_MS);
  const isThere = () =>
    access(file).then(
      () => true,
      () => false,
    );
  while (!(await isThere())) await pause(50, null, { signal: patience });
}

/** Into the store that Chromium reads beside its own list: a certificate that is trusted, not an error that is ignored. */
async function trust(home: string, rootFile: string): Promise<void> {
  const store = join(home, '.pki/nssdb');
  await mkdir(store, { recursive: true });
  certutil('-N', '-d', `sql:${store}`, '--empty-password');
  certutil('-A', '-d', `sql:${store}`, '-n', 'the shop', '-t', 'C,,', '-i', rootFile);
}

function certutil(...args: string[]): void {
  const { status, stderr } = spawnSync('certutil', args);
  if (status !== 0) throw new Error(`certutil ${args[0]}: ${String(stderr)}`);
}
