/** Octets as a characteristic gives them, written as in a specification: `'E8 03'`. */
export function bytes(hex: string): DataView {
  return new DataView(
    Uint8Array.from(hex.split(' ').filter(Boolean), (octet) => parseInt(octet, 16)).buffer,
  );
}
