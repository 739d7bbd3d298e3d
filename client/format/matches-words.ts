/** Whether every word that is sought stands somewhere in these texts, capitals or not. */
export function matchesWords(sought: string, texts: string[]): boolean {
  const all = texts.join(' ').toLowerCase();
  return sought
    .toLowerCase()
    .split(/\s+/)
    .every((word) => all.includes(word));
}
