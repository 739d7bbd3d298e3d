import { describe, expect, test } from 'vitest';
import { eventAt, type ChartEvent } from '#client/chart/chart-events.ts';
import { moveOfKey } from '#client/chart/chart-keys.ts';
import { applyMove, startState, type ChartContext } from '#client/chart/chart-state.ts';
import { buildPyramid } from '#client/chart/pyramid.ts';

const timesS = Float64Array.from({ length: 101 }, (_, i) => i * 10);
const event = (timeS: number, words: string): ChartEvent => ({
  timeS,
  tempC: null,
  words,
  call: null,
  kind: 'mark',
});
const context: ChartContext = {
  pyramid: buildPyramid(timesS, new Float64Array(101), []),
  durationS: 1000,
  events: [event(280, 'cut-out 1'), event(600, 'click')],
  widthPx: 1000,
};
const press = (key: string, more: Partial<KeyboardEvent> = {}) =>
  moveOfKey({ key, shiftKey: false, ctrlKey: false, altKey: false, metaKey: false, ...more });

/** The state after keys are pressed one after the other. */
function after(...keys: string[]) {
  return keys.reduce((state, key) => {
    const move = press(key);
    return move ? applyMove(state, move, context) : state;
  }, startState(1000));
}

describe('the keyboard', () => {
  test('arrows step along the readings', () => {
    expect(after('ArrowRight').cursorS).toBe(0);
    expect(after('ArrowRight', 'ArrowRight', 'ArrowRight').cursorS).toBe(20);
    expect(after('ArrowLeft').cursorS).toBe(1000);
  });

  test('N and P step through the events and stay at the last', () => {
    expect(after('n').cursorS).toBe(280);
    expect(after('n', 'n').cursorS).toBe(600);
    expect(after('n', 'n', 'n').cursorS).toBe(600);
    expect(after('n', 'n', 'p').cursorS).toBe(280);
  });

  test('plus zooms about the readout, minus and Escape come back', () => {
    expect(after('n', '+').view).toEqual({ fromS: 140, toS: 640 });
    expect(after('n', '+', '-').view).toEqual({ fromS: 0, toS: 1000 });
    expect(after('+', '+', 'Escape').view).toEqual({ fromS: 0, toS: 1000 });
  });

  test('Page Down moves on by most of what is shown', () => {
    expect(after('+', 'Home', 'PageDown').view).toEqual({ fromS: 400, toS: 900 });
  });

  test('Home and End take the view along', () => {
    expect(after('+', '+', 'End')).toEqual({ cursorS: 1000, view: { fromS: 750, toS: 1000 } });
    expect(after('+', '+', 'End', 'Home').view.fromS).toBe(0);
  });

  test('keys of the browser and keys unknown to the chart are left alone', () => {
    expect(press('+', { ctrlKey: true })).toBeNull();
    expect(press('Tab')).toBeNull();
    expect(press('ArrowUp')).toBeNull();
  });
});

test('an event is named only near its moment', () => {
  expect(eventAt(context.events, 281, 2)?.words).toBe('cut-out 1');
  expect(eventAt(context.events, 300, 2)).toBeNull();
});
