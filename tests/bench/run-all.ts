/**
 * `npm run bench` runs every bench, `npm run bench -- accuracy 5` one of them with its own arguments.
 * A bench is a folder or file here that exports `bench(args)` and prints its table.
 */
const BENCHES: Record<string, () => Promise<{ bench: (args: string[]) => void | Promise<void> }>> =
  {
    accuracy: () => import('./accuracy/accuracy.ts'),
    guard: () => import('./guard/guard.ts'),
    damage: () => import('./damage/damage.ts'),
    reading: () => import('./reading/reading.ts'),
    chart: () => import('./chart/chart.ts'),
    server: () => import('./server/server.ts'),
    stopwatch: () => import('./stopwatch/stopwatch.ts'),
    clock: () => import('./clock/clock.ts'),
    schedules: () => import('./schedules/schedules.ts'),
  };

async function run([asked, ...args]: string[]): Promise<void> {
  for (const name of asked === undefined ? Object.keys(BENCHES) : [asked]) {
    const load = BENCHES[name];
    if (!load) throw new Error(`no bench "${name}"; there are ${Object.keys(BENCHES).join(', ')}`);
    const { bench } = await load();
    await bench(args);
  }
}

// Broken off, it still ends the servers and browsers that it began.
for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => process.exit(1));
await run(process.argv.slice(2));

export {};
