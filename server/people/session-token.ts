import type { KeyObject } from 'node:crypto';
import jwt from 'jsonwebtoken';
import { z } from 'zod';

const AUDIENCE = 'fusekeeper';
const ALGORITHM = 'HS256';

const claimsSchema = z.object({ jti: z.uuid(), sub: z.uuid() });
export type SessionClaims = { sessionId: string; userId: string };

/** The key is a KeyObject: with a string each check would cost forty times as long. */
export function signToken(claims: SessionClaims, key: KeyObject, expiresAtMs: number): string {
  const exp = Math.floor(expiresAtMs / 1000);
  return jwt.sign({ exp }, key, {
    algorithm: ALGORITHM,
    audience: AUDIENCE,
    jwtid: claims.sessionId,
    subject: claims.userId,
  });
}

/** Undefined for anything but a token of ours that is in date: why is nobody's business. */
export function readToken(token: string, key: KeyObject, nowMs: number): SessionClaims | undefined {
  try {
    const payload = jwt.verify(token, key, {
      algorithms: [ALGORITHM],
      audience: AUDIENCE,
      clockTimestamp: Math.floor(nowMs / 1000),
    });
    const claims = claimsSchema.safeParse(payload);
    return claims.success ? { sessionId: claims.data.jti, userId: claims.data.sub } : undefined;
  } catch (error) {
    if (error instanceof jwt.JsonWebTokenError) return undefined;
    throw error;
  }
}
