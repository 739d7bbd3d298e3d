import { createHash } from 'node:crypto';
import type { Thing } from '#shared/schemas/sendings.ts';

/** What makes two things the same: kind, place in the chain and payload, whatever the order of names in it. */
export function thingHash({ kind, chain, chainN, payload }: Thing): string {
  const words = JSON.stringify({ kind, chain, chainN, payload }, sorted);
  return createHash('sha256').update(words).digest('hex');
}

function sorted(_name: string, value: unknown): unknown {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) return value;
  return Object.fromEntries(Object.entries(value).toSorted(([a], [b]) => (a < b ? -1 : 1)));
}
