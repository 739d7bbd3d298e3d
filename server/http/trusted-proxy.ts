import { BlockList, isIP } from 'node:net';
import type { Express, Request } from 'express';

/** Ranges of addresses, as `TRUSTED_PROXY` names them: `10.0.0.2`, `10.0.0.0/24`, `::1`. */
export type TrustedProxy = readonly string[];

export const LOOPBACK: TrustedProxy = ['127.0.0.0/8', '::1'];

/**
 * Whoever connects to us is believed about a request's origin only if it is the proxy that the shop
 * named, and only about the one step before it: what a caller wrote into X-Forwarded-For itself
 * stands further left and counts for nothing.
 */
export function trustOneHop(app: Express, trusted: TrustedProxy): void {
  const isNamed = within(trusted);
  app.set('trust proxy', (address: string, hop: number) => hop === 0 && isNamed(address));
}

/** Whose request this is: the caller as the trusted proxy saw it, else whoever connected to us. */
export function clientAddress(req: Request): string {
  const { ip = '' } = req;
  return isIP(ip) > 0 ? ip : (req.socket.remoteAddress ?? '');
}

/** @throws {TypeError | RangeError} a range that is none */
export function within(ranges: readonly string[]): (address: string) => boolean {
  const list = new BlockList();
  for (const range of ranges) {
    const [address = '', prefix] = range.split('/');
    const family = familyOf(address);
    if (prefix === undefined) list.addAddress(address, family);
    else list.addSubnet(address, Number(prefix), family);
  }
  // An IPv4 caller of a socket for both families comes as ::ffff:a.b.c.d, which the list knows.
  return (address) => isIP(address) > 0 && list.check(address, familyOf(address));
}

function familyOf(address: string): 'ipv4' | 'ipv6' {
  return isIP(address) === 6 ? 'ipv6' : 'ipv4';
}
