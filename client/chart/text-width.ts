/** Advance widths of Besley 400 from space to tilde, 1/100 em, read from the font. */
const BESLEY = [
  30, 32, 37, 66, 66, 100, 87, 20, 44, 44, 63, 53, 25, 46, 23, 52, 59, 52, 57, 53, 54, 51, 55, 52,
  53, 55, 23, 25, 56, 56, 56, 55, 106, 86, 75, 81, 82, 76, 72, 87, 88, 41, 59, 87, 73, 103, 87, 83,
  69, 83, 77, 67, 77, 84, 86, 118, 87, 78, 75, 32, 52, 32, 54, 56, 39, 56, 64, 54, 64, 55, 39, 60,
  66, 33, 29, 61, 31, 92, 67, 57, 64, 63, 48, 50, 35, 66, 58, 86, 58, 62, 54, 27, 30, 27, 69,
];
const OTHER = 60;
const SPACE = 32;

/** How wide a note stands, CSS px: layout has no canvas at hand, and must not wait for one. */
export function noteWidthPx(text: string, sizePx: number): number {
  let hundredths = 0;
  for (const character of text) {
    hundredths += BESLEY[(character.codePointAt(0) ?? 0) - SPACE] ?? OTHER;
  }
  return (hundredths / 100) * sizePx;
}
