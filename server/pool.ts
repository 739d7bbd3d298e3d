import { availableParallelism } from 'node:os';
import { createRequire } from 'node:module';
import { pathToFileURL } from 'node:url';
import { Piscina } from 'piscina';

/** The threads that keep the main one free; each starts at its first task. */
export type Workers = { passwords: Piscina; runs: Piscina };

/**
 * @param beside the file in whose folder they lie: this one. From source they are TypeScript and need tsx; built they
 *   are JavaScript
 * @param niceIncrement where cores are short, whoever waits for a page goes first
 */
export function openWorkers({ beside = import.meta.url, niceIncrement = 10 } = {}): Workers {
  return {
    // One hash at a time: a storm of sign-ins must leave a core for everyone else.
    passwords: pool(beside, 'people/password-worker', { maxThreads: 1, maxQueue: 20 }),
    runs: pool(beside, 'runs/run-worker', {
      maxThreads: Math.max(1, availableParallelism() - 1),
      niceIncrement,
    }),
  };
}

export async function closeWorkers(workers: Workers): Promise<void> {
  await Promise.all([workers.passwords.destroy(), workers.runs.destroy()]);
}

function pool(
  beside: string,
  name: string,
  limits: { maxThreads: number; maxQueue?: number; niceIncrement?: number },
): Piscina {
  const fromSource = beside.endsWith('.ts');
  return new Piscina({
    filename: new URL(`./${name}.${fromSource ? 'ts' : 'js'}`, beside).href,
    execArgv: fromSource ? ['--import', tsxInThread()] : [],
    minThreads: 0,
    idleTimeout: 60_000,
    ...limits,
  });
}

/**
 * tsx registers itself on the main thread only (Node 20), so a thread is told to. The address is absolute: the
 * folder the program was started in does not matter.
 */
function tsxInThread(): string {
  const loader = pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href;
  const api = new URL('./esm/api/index.mjs', loader).href;
  return `data:text/javascript,import { register } from '${api}'; register();`;
}
