import { describe, expect, test } from 'vitest';
import { drawNotes, placeNotes, wrapWithin } from '#client/chart/draw-notes.ts';
import { xOf, yOf } from '#client/chart/frame.ts';
import { celsius, frameOf, PHONE_PLOT } from './frame-of.ts';

const clear = { reach: () => null, hatched: [] };
const note = (timeS: number, tempF: number, text: string, letter = 'A') => ({
  letter,
  timeS,
  tempC: celsius(tempF),
  text,
});

describe('notes', () => {
  test('hang from their moment to a shelf 32 °F above the foot, words at the right', () => {
    const frame = frameOf();

    const [place] = placeNotes(frame, [note(300, 150, 'Door open')], clear);

    expect(place).toMatchObject({
      x: xOf(frame, 300),
      dotY: yOf(frame, celsius(150)),
      side: 'right',
    });
    expect(place!.textY).toBeCloseTo(yOf(frame, celsius(96)), 9);
  });

  test('a neighbour takes another place rather than stand on the words', () => {
    const frame = frameOf();

    const [first, second] = placeNotes(
      frame,
      [note(300, 150, 'Door open for a photo'), note(330, 150, 'Door shut again', 'B')],
      clear,
    );

    expect(first!.side).toBe('right');
    expect([second!.side, second!.textY]).not.toEqual(['right', first!.textY]);
  });

  test('near the right edge the words stand left of the line', () => {
    const [place] = placeNotes(frameOf(), [note(1070, 150, 'Heat off')], clear);

    expect(place!.side).toBe('left');
  });

  test('on a falling end they hang upward', () => {
    const frame = frameOf();
    const falling = { top: yOf(frame, celsius(140)), foot: yOf(frame, celsius(100)) };
    const reach = (fromX: number) => (fromX > xOf(frame, 900) ? falling : null);

    const [place] = placeNotes(frame, [note(900, 150, 'Falls freely')], { reach, hatched: [] });

    expect(place!.textY).toBeLessThan(place!.dotY);
  });

  test('words keep clear of a hatched span where there is another place', () => {
    const frame = frameOf();
    const hatched = [{ ...frame.plot, left: xOf(frame, 715), width: 250 }];

    const [place] = placeNotes(frame, [note(702, 156, 'Click')], { reach: () => null, hatched });

    expect(place!.side).toBe('left');
  });

  test('a phone shows the letter alone', () => {
    const frame = frameOf({ compact: true, plot: PHONE_PLOT });

    const words = drawNotes(placeNotes(frame, [note(300, 150, 'Door open')], clear)).filter(
      (shape) => shape.kind === 'words',
    );

    expect(words.map((shape) => shape.text)).toEqual(['A']);
  });

  test('a note out of sight is left out', () => {
    const frame = frameOf({ fromS: 0, toS: 200 });

    expect(placeNotes(frame, [note(300, 150, 'Door open')], clear)).toEqual([]);
  });

  test('long words are cut after three lines, and say so', () => {
    const lines = wrapWithin('one two three four five six seven eight nine ten eleven twelve', 80);

    expect(lines).toHaveLength(3);
    expect(lines.at(-1)).toMatch(/…$/);
  });
});
