export type Delimiter = ',' | ';' | '\t' | '|' | ' ';

/** `unclosed`: a quote was opened and never closed on this line; its text is then the rest of the line. */
export type CellSplit = { cells: string[]; unclosed: boolean };

/**
 * The trimmed cells of one line. A cell may be quoted (RFC 4180), with spaces before the quote;
 * a quote inside an unquoted cell is an ordinary character.
 */
export function splitCells(line: string, delimiter: Delimiter): CellSplit {
  if (delimiter === ' ') {
    const text = line.trim();
    return { cells: text === '' ? [] : text.split(/[ \t]+/), unclosed: false };
  }
  if (!line.includes('"')) {
    const cells = line.split(delimiter);
    for (let i = 0; i < cells.length; i++) cells[i] = cells[i]!.trim();
    return { cells, unclosed: false };
  }
  return splitQuoted(line, delimiter);
}

function splitQuoted(line: string, delimiter: Delimiter): CellSplit {
  const cells: string[] = [];
  let at = 0;
  let unclosed = false;
  while (at <= line.length) {
    let start = at;
    while (line[start] === ' ') start++;
    if (line[start] !== '"') {
      const to = endOfCell(line, start, delimiter);
      cells.push(line.slice(at, to).trim());
      at = to + 1;
      continue;
    }
    const quoted = quotedCell(line, start + 1);
    const to = endOfCell(line, quoted.after, delimiter);
    unclosed ||= !quoted.closed;
    cells.push((quoted.text + line.slice(quoted.after, to)).trim());
    at = to + 1;
  }
  return { cells, unclosed };
}

function endOfCell(line: string, from: number, delimiter: string): number {
  const to = line.indexOf(delimiter, from);
  return to < 0 ? line.length : to;
}

function quotedCell(line: string, from: number): { text: string; after: number; closed: boolean } {
  let text = '';
  let at = from;
  for (;;) {
    const quote = line.indexOf('"', at);
    if (quote < 0) return { text: text + line.slice(at), after: line.length, closed: false };
    text += line.slice(at, quote);
    if (line[quote + 1] !== '"') return { text, after: quote + 1, closed: true };
    text += '"';
    at = quote + 2;
  }
}
