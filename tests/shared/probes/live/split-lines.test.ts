import fc from 'fast-check';
import { expect, test } from 'vitest';
import { splitLines } from '#shared/probes/live/split-lines.ts';

function linesOf(pieces: string[]) {
  const lines: string[] = [];
  let rest = '';
  let noise = 0;
  for (const piece of pieces) {
    const next = splitLines(rest, piece);
    lines.push(...next.lines);
    rest = next.rest;
    noise += next.noise;
  }
  return { lines, rest, noise };
}

test('LF, CR and CR LF end a line, also where a piece ends between the two', () => {
  expect(linesOf(['154.2\n154.4\r155', '.1\r', '\n155.3\r\n15'])).toEqual({
    lines: ['154.2', '154.4', '155.1', '155.3'],
    rest: '15',
    noise: 0,
  });
});

test('lines come out the same wherever the pieces end', () => {
  const whole = 'T=154.2 F\r\nT=154.4 F\r\nT=154.6 F\r\n';

  fc.assert(
    fc.property(fc.array(fc.nat(whole.length), { maxLength: 12 }), (cuts) => {
      const at = [0, ...cuts.sort((a, b) => a - b), whole.length];
      const pieces = at.slice(1).map((to, i) => whole.slice(at[i], to));

      expect(linesOf(pieces).lines).toEqual(['T=154.2 F', 'T=154.4 F', 'T=154.6 F']);
    }),
  );
});

test('noise without an end is counted and let go, so that it cannot fill the memory', () => {
  const { rest, noise, lines } = linesOf(['x'.repeat(300), 'x'.repeat(150), `y\n154.2\n`]);

  expect({ rest, noise, lines }).toEqual({
    rest: '',
    noise: 1,
    lines: ['x'.repeat(150) + 'y', '154.2'],
  });
});
