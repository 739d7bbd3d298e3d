import { createHmac } from 'node:crypto';
import bcrypt from 'bcryptjs';

const COST = 12;

/** What a worker is asked: to make a hash, or to compare with one. */
export type HashTask = { do: 'hash'; prehash: string } | Comparison;
type Comparison = { do: 'compare'; prehash: string; hash: string };

/**
 * 64 characters of HMAC-SHA-384 in place of the password, since bcrypt ignores all past 72 bytes;
 * keyed, so that a stolen database alone cannot be guessed at.
 */
export function prehash(password: string, pepper: Buffer): string {
  return createHmac('sha384', pepper).update(password.normalize('NFC'), 'utf8').digest('base64');
}

/** Blocks for about a third of a second: for workers and commands, never for the main thread. */
export function hashNow(prehashed: string): string {
  return bcrypt.hashSync(prehashed, COST);
}

export function compareNow(prehashed: string, hash: string): boolean {
  return bcrypt.compareSync(prehashed, hash);
}

/** Matches no password; compared with where there is no such person, so that it takes as long. */
export const NOBODYS_HASH = `$2b$${COST}$${'.'.repeat(53)}`;
