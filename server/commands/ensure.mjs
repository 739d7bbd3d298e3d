// Makes ready what a command needs, and only that: packages, the build, a browser for the tests.
// Plain JavaScript with nothing but Node, since it runs before anything is installed. It speaks on
// stderr, so that a command's own output stays clean.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';

const ROOT = fileURLToPath(new URL('../../', import.meta.url));
const SERVER_SOURCES = ['package.json', 'server', 'shared', 'migrations'];
const CLIENT_SOURCES = [
  'package.json',
  'client',
  'shared',
  'index.html',
  'vite.config.ts',
  'tailwind.config.js',
];
const LOCK = join(ROOT, '.ensure-lock');
const LOCK_PATIENCE_MS = 10 * 60_000;
const wants = new Set(process.argv.slice(2));

/** Says why on one line and ends the command. */
function giveUp(why) {
  process.stderr.write(`${why}\n`);
  process.exit(1);
}

function run(command, args) {
  const { status, error } = spawnSync(command, args, {
    cwd: ROOT,
    stdio: ['ignore', 2, 2],
    // What is compiled while it is installed may take all cores.
    env: { JOBS: 'max', ...process.env },
  });
  if (error || status !== 0)
    giveUp(`"${command} ${args.join(' ')}" failed; its own words stand above.`);
}

function filesUnder(path) {
  if (!existsSync(path)) return [];
  if (statSync(path).isFile()) return [path];
  return readdirSync(path).flatMap((name) => filesUnder(join(path, name)));
}

function hashOf(paths, extra = '') {
  const hash = createHash('sha256').update(extra);
  for (const file of paths.flatMap((path) => filesUnder(join(ROOT, path))).sort()) {
    hash.update(file).update(readFileSync(file));
  }
  return hash.digest('hex');
}

/** Does the work only where the stamp has another hash; the stamp is written last. */
function unlessDone(stamp, hash, work) {
  const path = join(ROOT, stamp);
  if (existsSync(path) && readFileSync(path, 'utf8') === hash) return;
  work();
  writeFileSync(path, hash);
}

function ensurePackages() {
  const abi = `${process.versions.modules}-${process.platform}-${process.arch}`;
  unlessDone('node_modules/.ensure-stamp', hashOf(['package-lock.json'], abi), () => {
    process.stderr.write('Installing packages. The first time takes a few minutes.\n');
    // Build tools are wanted even where NODE_ENV says production.
    run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund']);
    if (!loadsDatabase()) run('npm', ['rebuild', 'better-sqlite3']);
  });
}

function loadsDatabase() {
  try {
    const Database = createRequire(import.meta.url)('better-sqlite3');
    new Database(':memory:').close();
    return true;
  } catch {
    return false;
  }
}

function ensureServer() {
  mkdirSync(join(ROOT, 'dist'), { recursive: true });
  unlessDone('dist/.ensure-server', hashOf(SERVER_SOURCES), () =>
    run('npm', ['run', '-s', 'build:server']),
  );
}

function ensureClient() {
  unlessDone('dist/.ensure-client', hashOf(CLIENT_SOURCES), () =>
    run('npm', ['run', '-s', 'build:client']),
  );
}

function ensureBrowser() {
  if (existsSync(process.env.CHROMIUM_PATH ?? '/usr/bin/chromium')) return;
  if (!maySetUp()) {
    giveUp(
      'The browser tests need Chromium: "sudo apt-get install chromium", or set CHROMIUM_PATH.',
    );
  }
  run('apt-get', ['update', '-q']);
  run('apt-get', ['install', '-q', '-y', '--no-install-recommends', 'chromium']);
}

/** For one test only, which is skipped without it; so nothing ends here. */
function ensureProxy() {
  const missing = [];
  if (!isProgram('caddy')) missing.push('caddy');
  if (!isProgram('certutil')) missing.push('libnss3-tools');
  if (missing.length === 0) return;
  const apt = (...args) => spawnSync('apt-get', args, { stdio: ['ignore', 2, 2] }).status === 0;
  const install = ['install', '-q', '-y', '--no-install-recommends', ...missing];
  if (!maySetUp() || !apt('update', '-q') || !apt(...install)) {
    process.stderr.write(
      `One browser test is skipped, since it needs a proxy: "sudo apt-get install ${missing.join(' ')}".\n`,
    );
  } else if (missing.includes('caddy') && existsSync('/run/systemd/system')) {
    // The package starts a service on port 80; a test wants none.
    spawnSync('systemctl', ['disable', '--now', 'caddy'], { stdio: ['ignore', 2, 2] });
  }
}

function isProgram(name) {
  return spawnSync(name, ['--help'], { stdio: 'ignore' }).error === undefined;
}

function maySetUp() {
  return process.getuid?.() === 0 && existsSync('/usr/bin/apt-get');
}

/** Two commands at once take turns; a lock left by a process that is gone is broken. */
async function withLock(work) {
  const started = performance.now();
  while (!takeLock()) {
    if (performance.now() - started > LOCK_PATIENCE_MS)
      giveUp(`Another command holds ${LOCK}; delete it if none runs.`);
    await pause(200);
  }
  process.on('exit', () => rmSync(LOCK, { force: true }));
  work();
}

function takeLock() {
  try {
    writeFileSync(LOCK, String(process.pid), { flag: 'wx' });
    return true;
  } catch (error) {
    if (error.code !== 'EEXIST') throw error;
    breakStaleLock();
    return false;
  }
}

function breakStaleLock() {
  try {
    const holder = Number(readFileSync(LOCK, 'utf8'));
    if (holder > 0) process.kill(holder, 0);
  } catch (error) {
    if (error.code === 'ESRCH') rmSync(LOCK, { force: true });
  }
}

const [major, minor] = process.versions.node.split('.').map(Number);
if (major < 20 || (major === 20 && minor < 19)) {
  giveUp(`Fusekeeper needs Node.js 20.19 or later; this is ${process.versions.node}.`);
}

await withLock(() => {
  ensurePackages();
  if (wants.has('--build') || wants.has('--server')) ensureServer();
  if (wants.has('--build')) ensureClient();
  if (wants.has('--browser')) {
    ensureBrowser();
    ensureProxy();
  }
});
