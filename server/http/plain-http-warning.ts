import { LOOPBACK, within } from './trusted-proxy.ts';

const isLoopbackAddress = within(LOOPBACK);

/** A line for the person who started the server, where others reach it without TLS; else nothing. */
export function plainHttpWarning({ host, publicUrl }: { host: string; publicUrl: URL | null }) {
  const isOpen = !isThisMachine(host) || (publicUrl !== null && !isThisMachine(publicUrl.hostname));
  if (!isOpen || publicUrl?.protocol === 'https:') return '';
  return (
    'Warning: other machines reach this server over plain http. Passwords and readings can be read ' +
    'on the way, and a phone works without signal over https only. Set PUBLIC_URL to an https ' +
    'address; README.md says how, under "On the shop’s phones".\n'
  );
}

function isThisMachine(host: string): boolean {
  // An address of IPv6 stands between brackets in a URL.
  const name = host.replace(/^\[|\]$/g, '');
  return name === 'localhost' || name.endsWith('.localhost') || isLoopbackAddress(name);
}
