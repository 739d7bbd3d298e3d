import { expect, test } from 'vitest';
import { clampTime, moveHandle } from '#client/pages/upload/move-handle.ts';

const bounds = { lowS: 10, highS: 200.5 };

test('arrows move a handle by a second, page keys by a minute', () => {
  expect(moveHandle('ArrowRight', 100, bounds)).toBe(101);
  expect(moveHandle('ArrowLeft', 100, bounds)).toBe(99);
  expect(moveHandle('PageUp', 100, bounds)).toBe(160);
  expect(moveHandle('PageDown', 100, bounds)).toBe(40);
});

test('a handle goes no further than its neighbour or the end of the record', () => {
  expect(moveHandle('PageDown', 30, bounds)).toBe(10);
  expect(moveHandle('End', 30, bounds)).toBe(200.5);
  expect(moveHandle('Home', 30, bounds)).toBe(10);
  expect(clampTime(999, bounds)).toBe(200.5);
});

test('other keys leave it where it is', () => {
  expect(moveHandle('a', 100, bounds)).toBeNull();
  expect(moveHandle('Tab', 100, bounds)).toBeNull();
});
