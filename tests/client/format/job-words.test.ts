import { expect, test } from 'vitest';
import { machineWords, quoted, shortName } from '#client/format/job-words.ts';
import { matchesWords } from '#client/format/matches-words.ts';

test('a machine is its make, model and fuel', () => {
  expect(machineWords({ make: 'Calder', model: 'D-60', fuel: 'electric' })).toBe(
    'Calder D-60, electric',
  );
  expect(machineWords({ make: 'Norrin', model: '', fuel: 'gas' })).toBe('Norrin, gas');
});

test('a complaint is quoted once, however it was typed', () => {
  expect([quoted('No heat.'), quoted('“No heat.”'), quoted('"No heat."')]).toEqual(
    Array(3).fill('“No heat.”'),
  );
});

test('a name is shortened to an initial and the last name', () => {
  expect([shortName('Tom Birkett'), shortName('Ada  Mary Quill'), shortName('Cher')]).toEqual([
    'T. Birkett',
    'A. Quill',
    'Cher',
  ]);
});

test('a search finds every word anywhere, capitals or not', () => {
  const texts = ['Hester Lund', '14 Weir Street', 'CA-20418'];

  expect(matchesWords('weir hester', texts)).toBe(true);
  expect(matchesWords('ca-204', texts)).toBe(true);
  expect(matchesWords('', texts)).toBe(true);
  expect(matchesWords('weir birkett', texts)).toBe(false);
});
