import { describe, expect, test } from 'vitest';
import type { Call, Point } from '#shared/analysis/analysis.ts';
import { drawCall, drawMarks } from '#client/chart/draw-marks.ts';
import { drawHotSpan, drawPaper, drawWall, nameHotSpan } from '#client/chart/draw-paper.ts';
import { drawHeatPen, drawMarkPen } from '#client/chart/draw-pens.ts';
import { drawBrackets, drawHoles, drawScale } from '#client/chart/draw-scale.ts';
import { drawOverTrace, drawUnderTrace } from '#client/chart/draw-strip.ts';
import { xOf, yOf } from '#client/chart/frame.ts';
import { chooseGridSteps } from '#client/chart/grid-steps.ts';
import { buildPyramid } from '#client/chart/pyramid.ts';
import type { Shape, Words } from '#client/chart/shapes.ts';
import { EMPTY_STRIP, type Bands } from '#client/chart/strip.ts';
import { celsius, frameOf, PHONE_PLOT } from './frame-of.ts';

const bands: Bands = {
  opensC: celsius(155),
  opensTolK: 5 / 1.8,
  closesC: celsius(130),
  closesTolK: 5 / 1.8,
  highLimitC: celsius(196),
};

function pointAt(timeS: number, tempF: number, call: Call | null, uF = 1): Point {
  return {
    kind: tempF > 145 ? 'cut-out' : 'reset',
    timeS,
    tempC: celsius(tempF),
    uK: uF / 1.8,
    uTotalK: uF / 1.8,
    judged: call !== null,
    call,
    probability: null,
    switchTimeS: null,
    switchTempC: null,
    switchUS: null,
  };
}

const wordsOf = (shapes: Shape[]) =>
  shapes.filter((shape): shape is Words => shape.kind === 'words').map((shape) => shape.text);

describe('what is printed', () => {
  test('the stripes lie under the ruling, and their edges over it', () => {
    const frame = frameOf();

    const inks = drawPaper(frame, bands, chooseGridSteps(frame)).map((shape) =>
      'ink' in shape ? shape.ink : null,
    );

    expect(inks).toEqual([
      'strip',
      'band-opens',
      'band-closes',
      'grid-minor',
      'grid-major',
      'band-edge',
    ]);
  });

  test('the upper stripe spans 150 to 160 °F over the whole width', () => {
    const frame = frameOf();

    const stripe = drawPaper(frame, bands, chooseGridSteps(frame))[1];

    expect(stripe).toMatchObject({ kind: 'bar', ink: 'band-opens' });
    if (stripe?.kind !== 'bar') return;
    expect(stripe.box.top).toBeCloseTo(yOf(frame, celsius(160)), 9);
    expect(stripe.box.top + stripe.box.height).toBeCloseTo(yOf(frame, celsius(150)), 9);
    expect(stripe.box).toMatchObject({ left: frame.plot.left, width: frame.plot.width });
  });

  test('the wall stands at the high limit, hatched behind', () => {
    const frame = frameOf();

    const [hatching, line] = drawWall(frame, bands.highLimitC);

    expect(hatching).toMatchObject({ kind: 'line', ink: 'stop', widthPx: 1.1 });
    expect(line).toMatchObject({ kind: 'line', ink: 'stop', widthPx: 1.75 });
    if (line?.kind === 'line') expect(line.path[1]).toBeCloseTo(yOf(frame, celsius(196)), 9);
  });

  test('a wall above the paper is not drawn', () => {
    expect(drawWall(frameOf(), celsius(230))).toEqual([]);
  });

  test('a hatched span is closed by two uprights and named where there is room', () => {
    const frame = frameOf();
    const span = { fromS: 715, toS: 942, words: ['heat kept coming', '3:47'], traceIsHot: true };

    const [hatching, uprights] = drawHotSpan(frame, span);

    expect(hatching).toMatchObject({ opacity: 0.55, clip: { left: xOf(frame, 715) } });
    expect(uprights).toMatchObject({ widthPx: 1, ink: 'stop' });
    expect(wordsOf(nameHotSpan(frame, span))).toEqual(['heat kept coming', '3:47']);
    expect(nameHotSpan(frame, { ...span, toS: 730 })).toEqual([]);
  });

  test('the scale is engraved each ten degrees, brackets name the stripes and the wall', () => {
    const frame = frameOf();

    const scale = wordsOf(drawScale(frame, chooseGridSteps(frame), 'left'));

    expect(scale).toEqual([
      '70',
      '80',
      '90',
      '100',
      '110',
      '120',
      '130',
      '140',
      '150',
      '160',
      '170',
      '180',
      '190',
      '200',
    ]);
    expect(wordsOf(drawBrackets(frame, bands))).toEqual([
      'opens',
      '155 ± 5',
      'closes',
      '130 ± 5',
      'high limit',
      '196',
    ]);
  });

  test('there is a feed hole each minute: two rows on a desk, one on a phone', () => {
    const desk = frameOf();
    const phone = frameOf({ compact: true, plot: PHONE_PLOT });

    expect(drawHoles(desk, chooseGridSteps(desk), 440)).toHaveLength(2 * 19);
    expect(drawHoles(phone, chooseGridSteps(phone), 320)).toHaveLength(19);
  });
});

describe('marks', () => {
  const at = { x: 10, y: 20, r: 6 };

  test('each call has a shape of its own', () => {
    const kinds = (call: Call | null) => drawCall(call, 'cut-out', at).map((shape) => shape.kind);

    expect(kinds('inside')).toEqual(['disc']);
    expect(drawCall('inside', 'cut-out', at)[0]).toMatchObject({ fill: 'ink' });
    expect(kinds('too-close')).toEqual(['disc']);
    expect(drawCall('too-close', 'cut-out', at)[0]).toMatchObject({ fill: 'strip', rim: 'ink' });
    expect(kinds('within-allowance')).toEqual(['disc', 'half-disc']);
    expect(kinds('outside')).toEqual(['disc', 'line']);
  });

  test('the open half of an allowance faces away from the band', () => {
    expect(drawCall('within-allowance', 'cut-out', at)[1]).toMatchObject({ side: 'lower' });
    expect(drawCall('within-allowance', 'reset', at)[1]).toMatchObject({ side: 'upper' });
  });

  test('the stroke of an outside mark reaches 1.55 radii', () => {
    const stroke = drawCall('outside', 'cut-out', at)[1];

    expect(stroke).toMatchObject({ widthPx: 2.25, ink: 'stop' });
    if (stroke?.kind === 'line') {
      expect(stroke.path).toEqual([10 - 9.3, 20 + 9.3, 10 + 9.3, 20 - 9.3]);
    }
  });

  test('the value stands above a cut-out and below a reset, in red where it is outside', () => {
    const frame = frameOf();
    const points = [pointAt(300, 163.5, 'outside'), pointAt(400, 132.2, 'inside')];

    const values = drawMarks(frame, points).filter((shape) => shape.kind === 'words');

    expect(values).toMatchObject([
      { text: '163.5', ink: 'stop' },
      { text: '132.2', ink: 'ink' },
    ]);
    expect(values[0]!.y).toBeLessThan(yOf(frame, celsius(163.5)));
    expect(values[1]!.y).toBeGreaterThan(yOf(frame, celsius(132.2)));
  });

  test('where values would run into each other the outside one is kept', () => {
    const crowd = [
      pointAt(300, 154, 'inside'),
      pointAt(310, 168, 'outside'),
      pointAt(320, 155, 'inside'),
    ];

    expect(wordsOf(drawMarks(frameOf(), crowd))).toEqual(['168.0']);
  });

  test('uncertainty shows as a whisker only where it reaches past the mark', () => {
    const lines = (uF: number) =>
      drawMarks(frameOf(), [pointAt(300, 154, 'inside', uF)]).filter(({ kind }) => kind === 'line');

    expect(lines(2)).toHaveLength(0);
    expect(lines(6)).toHaveLength(1);
  });

  test('a mark out of sight is not drawn', () => {
    const frame = frameOf({ fromS: 400, toS: 500 });

    expect(drawMarks(frame, [pointAt(300, 154, 'inside')])).toEqual([]);
  });
});

describe('event pens', () => {
  test('the heat pen steps up 8 px while heat is on', () => {
    const frame = frameOf();

    const pen = drawHeatPen(frame, [{ fromS: 60, toS: 120 }], 400).at(-1);

    if (pen?.kind !== 'line') throw new Error('the pen draws a line');
    expect(pen.path.slice(2, 10)).toEqual([
      xOf(frame, 60),
      400,
      xOf(frame, 60),
      392,
      xOf(frame, 120),
      392,
      xOf(frame, 120),
      400,
    ]);
  });

  test('a mark has its word where there is room for it', () => {
    const frame = frameOf();
    const marks = [
      { timeS: 100, word: 'click', isStop: false },
      { timeS: 102, word: 'click', isStop: true },
    ];

    const shapes = drawMarkPen(frame, marks, 420);

    expect(wordsOf(shapes)).toEqual(['marks', 'click']);
    expect(shapes.filter((shape) => shape.kind === 'line' && shape.ink === 'stop')).toHaveLength(1);
  });
});

test('a strip without a rating has paper and trace but no stripe, wall or bracket', () => {
  const frame = frameOf();
  const pyramid = buildPyramid(Float64Array.of(0, 600, 1080), Float64Array.of(20, 60, 50), []);

  const shapes = [
    ...drawUnderTrace(frame, EMPTY_STRIP),
    ...drawOverTrace(frame, EMPTY_STRIP, pyramid, 1206),
  ];

  const inks = new Set(shapes.map((shape) => ('ink' in shape ? shape.ink : null)));
  expect(inks.has('stop')).toBe(false);
  expect(inks.has('band-opens')).toBe(false);
  expect(wordsOf(shapes)).not.toContain('opens');
});
