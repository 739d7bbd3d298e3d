import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { fromCelsius } from '#shared/units.ts';
import { openingRun } from './opening-run.ts';

/** One size of the drawing, px; the desk shows it from cold, the phone from where the pen is. */
type Sheet = {
  width: number;
  height: number;
  top: number;
  foot: number;
  pxPerMin: number;
  pxPerF: number;
  /** Where 160 °F lies. */
  y160: number;
  penX: number | null;
  minorS: number;
  minorF: number;
  hatch: number;
  hole: number;
};

const DESK: Sheet = {
  width: 1440,
  height: 452,
  top: 26,
  foot: 422,
  pxPerMin: 86.4,
  pxPerF: 2.83,
  y160: 150.5,
  penX: null,
  minorS: 10,
  minorF: 2,
  hatch: 8,
  hole: 3.4,
};
const PHONE: Sheet = {
  width: 390,
  height: 300,
  top: 8,
  foot: 280,
  pxPerMin: 36.6,
  pxPerF: 2.26,
  y160: 107.6,
  penX: 316,
  minorS: 30,
  minorF: 5,
  hatch: 6,
  hole: 2.6,
};

const RUN = openingRun();
const inF = (tempC: number) => fromCelsius(tempC, 'F');
const { opensC, opensTolK, closesC, closesTolK, highLimitC } = DEFAULT_RATING;
const BANDS = [
  { fill: 'fill-band-opens', highF: inF(opensC + opensTolK), lowF: inF(opensC - opensTolK) },
  { fill: 'fill-band-closes', highF: inF(closesC + closesTolK), lowF: inF(closesC - closesTolK) },
];

function scalesOf(sheet: Sheet) {
  const lastS = RUN.readings.at(-1)?.timeS ?? 0;
  const startX = sheet.penX === null ? 0 : sheet.penX - (lastS / 60) * sheet.pxPerMin;
  return {
    x: (timeS: number) => startX + (timeS / 60) * sheet.pxPerMin,
    y: (tempF: number) => sheet.y160 + (160 - tempF) * sheet.pxPerF,
  };
}

const at = (value: number) => value.toFixed(1);

function steps(from: number, to: number, step: number) {
  return Array.from(
    { length: Math.floor((to - from) / step) + 1 },
    (_, index) => from + index * step,
  );
}

function gridPath(sheet: Sheet, everyS: number, everyF: number) {
  const { width, top, foot, pxPerMin, pxPerF, y160 } = sheet;
  const xs = steps(0, width, (everyS / 60) * pxPerMin);
  const highestF = Math.floor((160 + (y160 - top) / pxPerF) / everyF) * everyF;
  const ys = steps(y160 + (160 - highestF) * pxPerF, foot, everyF * pxPerF);
  return [
    ...xs.map((x) => `M${at(x)} ${top}V${foot}`),
    ...ys.map((y) => `M0 ${at(y)}H${width}`),
  ].join('');
}

function tracePath(sheet: Sheet) {
  const { x, y } = scalesOf(sheet);
  return RUN.readings
    .filter(({ timeS }) => timeS % 3 === 0)
    .map(({ timeS, tempC }, index) => `${index ? 'L' : 'M'}${at(x(timeS))} ${at(y(inF(tempC)))}`)
    .join('');
}

/** Feed holes run along both edges where the sheet is high enough. */
function holeYs({ top, foot, height }: Sheet) {
  const footY = (foot + height) / 2;
  return top > 20 ? [top / 2 + 2, footY] : [footY];
}

function Paper({ sheet }: { sheet: Sheet }) {
  const { width, height, top, foot, pxPerMin, hatch, hole } = sheet;
  const { y } = scalesOf(sheet);
  const wallY = y(inF(highLimitC));
  const strokes = steps(0, width, hatch).map((x) => `M${x} ${at(wallY)}l${hatch} -${hatch}`);
  return (
    <>
      <rect className="fill-strip" width={width} height={height} />
      {BANDS.map(({ fill, highF, lowF }) => (
        <rect key={fill} className={fill} y={y(highF)} width={width} height={y(lowF) - y(highF)} />
      ))}
      <path className="stroke-grid-minor" d={gridPath(sheet, sheet.minorS, sheet.minorF)} />
      <path className="stroke-grid-major" d={gridPath(sheet, 60, 10)} />
      {BANDS.map(({ fill, highF, lowF }) => (
        <path
          key={fill}
          className="stroke-band-edge"
          d={`M0 ${at(y(highF))}h${width}M0 ${at(y(lowF))}h${width}`}
        />
      ))}
      <path className="stroke-stop" strokeWidth="1.1" d={strokes.join('')} />
      <path className="stroke-stop" strokeWidth="1.75" d={`M0 ${at(wallY)}H${width}`} />
      <path className="stroke-print" d={`M0 ${top}H${width}M0 ${foot}H${width}`} />
      {steps(0, width, pxPerMin).flatMap((x) =>
        holeYs(sheet).map((cy) => (
          <circle
            key={`${x} ${cy}`}
            className="fill-paper stroke-grid-major"
            cx={x}
            cy={cy}
            r={hole}
          />
        )),
      )}
    </>
  );
}

function Drawing({ sheet, className }: { sheet: Sheet; className: string }) {
  const { x, y } = scalesOf(sheet);
  const pen = RUN.readings.at(-1) ?? { timeS: 0, tempC: 0 };
  const [penX, penY] = [x(pen.timeS), y(inF(pen.tempC))];
  const trace = tracePath(sheet);
  return (
    <svg
      className={`block h-auto w-full ${className}`}
      viewBox={`0 0 ${sheet.width} ${sheet.height}`}
      fill="none"
      aria-hidden="true"
    >
      <Paper sheet={sheet} />
      <path
        className="stroke-strip"
        strokeWidth="5"
        opacity="0.85"
        strokeLinejoin="round"
        d={trace}
      />
      <path className="stroke-ink" strokeWidth="2" strokeLinejoin="round" d={trace} />
      <path className="stroke-ink" d={`M${at(penX)} ${at(penY)}H${sheet.width}`} />
      <circle className="fill-ink stroke-strip" strokeWidth="1.5" cx={penX} cy={penY} r="5" />
      {RUN.turns.map(({ timeS, tempC }) => (
        <circle
          key={timeS}
          className="fill-ink stroke-strip"
          strokeWidth="1.5"
          cx={x(timeS)}
          cy={y(inF(tempC))}
          r={sheet === DESK ? 6 : 5.6}
        />
      ))}
    </svg>
  );
}

/** The strip over the sign-in: a sound run on the default rating, the pen waiting for its next cut-out. */
export function OpeningStrip() {
  return (
    <div className="overflow-hidden border-b border-print bg-strip">
      <Drawing sheet={DESK} className="hidden desk:block" />
      <Drawing sheet={PHONE} className="desk:hidden" />
    </div>
  );
}
