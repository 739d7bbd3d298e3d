import { mkdtemp, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import type { TestProject } from 'vitest/node';

const ROOT = fileURLToPath(new URL('../../', import.meta.url));

declare module 'vitest' {
  export interface ProvidedContext {
    /** A file in whose folder the built workers lie. */
    workersBeside: string;
  }
}

/** Builds the workers once: started from source, each test file would wait for a loader of its own. */
export async function setup(project: TestProject) {
  // Within node_modules, so that what they import is found from there.
  const folder = await mkdtemp(join(ROOT, 'node_modules', '.fusekeeper-workers-'));
  await build({
    entryPoints: ['server/runs/run-worker.ts', 'server/people/password-worker.ts'],
    absWorkingDir: ROOT,
    ...{ bundle: true, packages: 'external', platform: 'node', format: 'esm', target: 'node20' },
    ...{ outbase: 'server', outdir: folder, logLevel: 'warning' },
  });
  project.provide('workersBeside', pathToFileURL(join(folder, 'pool.js')).href);
  return () => rm(folder, { recursive: true });
}
