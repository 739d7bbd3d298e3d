/** Longer than any line of a thermometer: what has no end by then is noise, as a wrong speed makes it. */
const LONGEST = 200;

/** Text of a serial line that has come, and what of it is not a whole line yet. */
export type LinesSoFar = {
  /** Whole lines, without their ends; blank ones are left out. */
  lines: string[];
  /** Handed in again with the next piece. */
  rest: string;
  /** Stretches given up because no line ended in them. */
  noise: number;
};

/**
 * Cuts what a serial line brings into lines. They end in LF, CR or CR LF, and a piece may end anywhere, also between
 * CR and LF.
 *
 * @param rest of the piece before; '' at first
 * @param piece decoded text
 */
export function splitLines(rest: string, piece: string): LinesSoFar {
  const parts = (rest + piece).split(/[\r\n]+/);
  const open = parts.pop() ?? '';
  const isNoise = open.length > LONGEST;
  const whole = parts.filter((line) => line.trim() !== '');
  const lines = whole.filter(({ length }) => length <= LONGEST);
  return {
    lines,
    rest: isNoise ? '' : open,
    noise: whole.length - lines.length + (isNoise ? 1 : 0),
  };
}
