import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';

const ROOT = fileURLToPath(new URL('../../../', import.meta.url));
const SCRIPT = fileURLToPath(new URL('./print-hashes.ts', import.meta.url));
const ZONES = [
  'UTC',
  'America/New_York',
  'Europe/Berlin',
  'Asia/Kolkata',
  'Australia/Lord_Howe',
  'Pacific/Apia',
];

function hashesIn(zone: string): { zone: number; lines: string[] } {
  const out = execFileSync(process.execPath, ['--import', 'tsx', SCRIPT], {
    cwd: ROOT,
    env: { ...process.env, TZ: zone },
    encoding: 'utf8',
  });
  return JSON.parse(out) as { zone: number; lines: string[] };
}

test(
  'every odd input and every sample log is read alike in six time zones',
  { timeout: 180_000 },
  () => {
    const [first, ...others] = ZONES.map(hashesIn);

    expect(first!.lines.length).toBeGreaterThan(130);
    for (const other of others) expect(other.lines).toEqual(first!.lines);
    // the processes were in their zones indeed
    expect(new Set([first, ...others].map((hashes) => hashes!.zone)).size).toBe(ZONES.length);
  },
);
