/** A random UUID, version 4 (RFC 9562). `crypto.randomUUID` is missing where the page came over plain http. */
export function newId(): string {
  if (typeof crypto.randomUUID === 'function') return crypto.randomUUID();
  return uuidOf(crypto.getRandomValues(new Uint8Array(16)));
}

export function uuidOf(octets: Uint8Array): string {
  const hex = Array.from(octets, (octet, at) => {
    const marked = at === 6 ? (octet & 0x0f) | 0x40 : at === 8 ? (octet & 0x3f) | 0x80 : octet;
    return marked.toString(16).padStart(2, '0');
  }).join('');
  return hex.replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
}
