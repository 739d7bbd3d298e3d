import { createHash, randomBytes } from 'node:crypto';

const TOKEN_BYTES = 32;

/** 256 random bits, fit for an address. Told once and kept nowhere. */
export function makeToken(): string {
  return randomBytes(TOKEN_BYTES).toString('base64url');
}

/** What is stored of a token: it can be recognised, but not had back. */
export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
