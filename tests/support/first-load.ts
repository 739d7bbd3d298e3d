import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { z } from 'zod';

/** The stopwatch's first load with the engine in it, JavaScript as gzip sends it. */
export const FIRST_LOAD_BAR_KB = 120;

const STOPWATCH = 'client/pages/stopwatch/stopwatch-root.tsx';
const TAKING = 'client/pages/stopwatch/take-run.tsx';
const ENGINE = /^analysis-worker-[\w-]+\.js$/;

const manifestSchema = z.record(
  z.string(),
  z.object({ file: z.string(), imports: z.array(z.string()).default([]) }),
);
type Manifest = z.infer<typeof manifestSchema>;

export type LoadedFile = { file: string; kB: number };
export type FirstLoad = {
  /** What stands on the page before a run is begun, and the engine that judges it. */
  first: LoadedFile[];
  /** What comes behind it, while the cautions are read: keys, guard, strip. */
  behind: LoadedFile[];
};

/**
 * Read off the build: scripts of index.html, the static closure of the entry and of the stopwatch, and the engine's
 * worker. 1 kB is 1000 octets after gzip as the server packs (zlib's default level).
 *
 * @param clientFolder the built client, `dist/client`
 * @throws {Error} where the build has no such file: the count would be of something else
 */
export function firstLoad(clientFolder: string): FirstLoad {
  const manifest = manifestSchema.parse(
    JSON.parse(readFileSync(join(clientFolder, '.vite/manifest.json'), 'utf8')),
  );
  const first = new Set([
    ...plainScripts(clientFolder),
    ...closureOf(manifest, ['index.html', STOPWATCH]),
    engineIn(clientFolder),
  ]);
  const behind = closureOf(manifest, [TAKING]).filter((file) => !first.has(file));
  const packed = (file: string) => ({ file, kB: gzipKb(join(clientFolder, file)) });
  return { first: [...first].map(packed), behind: behind.map(packed) };
}

export function sumKb(files: readonly LoadedFile[]): number {
  return files.reduce((sum, { kB }) => sum + kB, 0);
}

function closureOf(manifest: Manifest, keys: string[], seen = new Set<string>()): string[] {
  for (const key of keys) {
    const chunk = manifest[key];
    if (!chunk) throw new Error(`the build's manifest has no ${key}`);
    if (seen.has(chunk.file)) continue;
    seen.add(chunk.file);
    closureOf(manifest, chunk.imports, seen);
  }
  return [...seen].filter((file) => file.endsWith('.js'));
}

/** Scripts that index.html names itself, outside the build's own. */
function plainScripts(clientFolder: string): string[] {
  const page = readFileSync(join(clientFolder, 'index.html'), 'utf8');
  const found = [...page.matchAll(/<script[^>]* src="\/([^"]+)"/g)].map(([, file = '']) => file);
  if (found.length === 0) throw new Error('index.html of the build has no script');
  return found;
}

function engineIn(clientFolder: string): string {
  const engines = readdirSync(join(clientFolder, 'assets')).filter((name) => ENGINE.test(name));
  const [only] = engines;
  if (only === undefined || engines.length > 1) {
    throw new Error(`the build has ${engines.length} files of the engine, not one`);
  }
  return `assets/${only}`;
}

function gzipKb(path: string): number {
  return gzipSync(readFileSync(path)).length / 1000;
}
