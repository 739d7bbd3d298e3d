import { startBuiltServer } from './built-server.ts';
import { findVisit, importByHttp } from './import-by-http.ts';
import { measureLatency, type Latencies } from './measure-latency.ts';
import { millionRowLog } from './million-row-log.ts';

const IDLE_MS = 4000;
const MOST_ROUNDS = 9;

/**
 * A small signed-in GET while a 1,000,000-row log is imported by HTTP, against the same GET before it.
 * Argument: how many rounds (default 5). Needs the built server: `npm run build:server`.
 */
export async function bench(args: string[]): Promise<void> {
  const rounds = Math.min(MOST_ROUNDS, Number(args[0] ?? 5));
  const log = millionRowLog();
  console.log(`server: GET /api/session at 50 a second, ${mb(log.length)} MB imported meanwhile`);
  console.log(
    'round  idle p50  p99   busy p50  p99   max    ratio  send   read   accept ms  peak MB',
  );
  const server = await startBuiltServer();
  try {
    const visitId = await findVisit(server);
    const url = `${server.origin}/api/session`;
    const ratios: number[] = [];
    // The first import starts the worker's thread; it is not counted.
    await importByHttp(server, visitId, log);
    const idleMb = await server.residentMb();
    for (let round = 1; round <= rounds; round++) {
      const idle = await measureLatency(url, server.cookie, pause(IDLE_MS));
      await server.forgetPeak();
      const importing = importByHttp(server, visitId, log);
      const busy = await measureLatency(url, server.cookie, importing);
      const ratio = busy.p99Ms / idle.p99Ms;
      ratios.push(ratio);
      console.log(row(round, idle, busy, ratio, await importing, await server.peakMb()));
    }
    console.log(`median ratio of the 99th percentiles ${median(ratios).toFixed(2)} (bar 6)`);
    console.log(`resident before the rounds ${idleMb.toFixed(0)} MB`);
  } finally {
    await server.stop();
  }
}

function row(
  round: number,
  idle: Latencies,
  busy: Latencies,
  ratio: number,
  took: { sendMs: number; readMs: number; acceptMs: number },
  peakMb: number,
): string {
  const ms = (value: number) => value.toFixed(1).padStart(6);
  const steps = [took.sendMs, took.readMs, took.acceptMs].map((value) => ms(value)).join(' ');
  const before = `${ms(idle.p50Ms)} ${ms(idle.p99Ms)}`;
  const during = `${ms(busy.p50Ms)} ${ms(busy.p99Ms)} ${ms(busy.maxMs)}`;
  return `${String(round).padStart(5)}  ${before}   ${during}  ${ratio.toFixed(2).padStart(5)}  ${steps}  ${peakMb.toFixed(0)}`;
}

function median(values: number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
}

function mb(bytes: number): string {
  return (bytes / 1e6).toFixed(1);
}

function pause(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, ms));
}
