/** How the last probe was reached, so that one press reaches it again after a reload. */
export type LastLink = { by: 'bluetooth'; id: string } | { by: 'cable'; baudRate: number };

const PLACE = 'fusekeeper-live-probe';

export function keepLastLink(link: LastLink): void {
  try {
    localStorage.setItem(PLACE, JSON.stringify(link));
  } catch {
    // Then the person chooses the probe again.
  }
}

export function lastLink(): LastLink | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(PLACE) ?? 'null');
    return isLink(kept) ? kept : null;
  } catch {
    return null;
  }
}

function isLink(kept: unknown): kept is LastLink {
  if (typeof kept !== 'object' || kept === null || !('by' in kept)) return false;
  if (kept.by === 'bluetooth') return 'id' in kept && typeof kept.id === 'string';
  return kept.by === 'cable' && 'baudRate' in kept && typeof kept.baudRate === 'number';
}
