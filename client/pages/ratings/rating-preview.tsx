import { useWatch, type Control } from 'react-hook-form';
import type { NewRating } from '#shared/schemas/ratings.ts';
import { readNumber } from '../../forms/typed-number.ts';
import { band } from '../../format/rating-words.ts';

const SIZE = 300;
const PLOT = { left: 44, right: 216, top: 10, foot: 286 };

type Stripe = { name: 'opens' | 'closes'; middle: number; tolerance: number };

/** What the cells hold while they are being typed into: a figure, or nothing readable yet. */
function figure(typed: unknown): number | null {
  const value = readNumber(typed);
  return value === null || !Number.isFinite(value) ? null : value;
}

function stripesOf(rating: Partial<NewRating>): Stripe[] {
  const opens = figure(rating.opens);
  const closes = rating.kind?.startsWith('thermal') ? null : figure(rating.closes);
  return [
    ...(closes === null
      ? []
      : [{ name: 'closes' as const, middle: closes, tolerance: figure(rating.closesTol) ?? 0 }]),
    ...(opens === null
      ? []
      : [{ name: 'opens' as const, middle: opens, tolerance: figure(rating.opensTol) ?? 0 }]),
  ];
}

/** The bands as they would be printed on a run's paper, beside the cells that they come from. */
export function RatingPreview({ control }: { control: Control<NewRating, unknown, NewRating> }) {
  const stripes = stripesOf(useWatch({ control }));
  return (
    <figure className="max-w-[300px]">
      <figcaption className="lab pb-2">What this prints on the chart</figcaption>
      <Bands stripes={stripes} />
      {stripes.length === 0 && (
        <p className="pt-2.5 text-small text-print">The bands appear as their figures are typed.</p>
      )}
      {isUpsideDown(stripes) && (
        <p className="pt-2.5 text-small text-print">
          Closes lies above opens. A thermostat cannot do that.
        </p>
      )}
    </figure>
  );
}

function isUpsideDown(stripes: Stripe[]) {
  const [closes, opens] = stripes;
  return closes !== undefined && opens !== undefined && closes.middle >= opens.middle;
}

/** A round reach of temperatures that holds every stripe, with room round them. */
function reachOf(stripes: Stripe[]) {
  const ends = stripes.flatMap(({ middle, tolerance }) => [middle - tolerance, middle + tolerance]);
  const low = ends.length === 0 ? 110 : Math.min(...ends);
  const high = ends.length === 0 ? 180 : Math.max(...ends);
  const step = niceStep(high - low);
  return {
    low: Math.floor(low / step) * step - step,
    high: Math.ceil(high / step) * step + step,
    step,
  };
}

function niceStep(span: number) {
  return [10, 20, 50, 100, 200].find((step) => span / step <= 8) ?? 500;
}

function Bands({ stripes }: { stripes: Stripe[] }) {
  const { low, high, step } = reachOf(stripes);
  const y = (temp: number) => PLOT.foot - ((temp - low) / (high - low)) * (PLOT.foot - PLOT.top);
  const lines = Array.from(
    { length: Math.round((high - low) / step) + 1 },
    (_, n) => low + n * step,
  );
  const minor = Array.from({ length: (lines.length - 1) * 5 }, (_, n) => low + (n * step) / 5);
  const columns = [0, 1, 2, 3, 4, 5].map((n) => PLOT.left + ((PLOT.right - PLOT.left) / 5) * n);
  const across = `H${PLOT.right}`;
  return (
    <svg
      className="fig block h-auto w-full border border-print bg-strip"
      viewBox={`0 0 ${SIZE} ${SIZE}`}
      fill="none"
      aria-hidden="true"
    >
      {stripes.map(({ name, middle, tolerance }) => (
        <rect
          key={name}
          className={name === 'opens' ? 'fill-band-opens' : 'fill-band-closes'}
          x={PLOT.left}
          width={PLOT.right - PLOT.left}
          y={y(middle + tolerance)}
          height={Math.max(1, y(middle - tolerance) - y(middle + tolerance))}
        />
      ))}
      <path
        className="stroke-grid-minor"
        d={minor.map((t) => `M${PLOT.left} ${y(t)}${across}`).join('')}
      />
      <path
        className="stroke-grid-major"
        d={[
          ...lines.map((t) => `M${PLOT.left} ${y(t)}${across}`),
          ...columns.map((x) => `M${x} ${PLOT.top}V${PLOT.foot}`),
        ].join('')}
      />
      <path
        className="stroke-print"
        d={[
          ...lines.map((t) => `M${PLOT.left - 3} ${y(t)}h-9`),
          ...minor.map((t) => `M${PLOT.left - 3} ${y(t)}h-4`),
        ].join('')}
      />
      {lines.slice(1, -1).map((t) => (
        <text
          key={t}
          className="fill-print text-scale"
          x={PLOT.left - 16}
          y={y(t) + 4}
          textAnchor="end"
        >
          {t}
        </text>
      ))}
      {stripes.map((stripe) => (
        <StripeName key={stripe.name} stripe={stripe} y={y} />
      ))}
    </svg>
  );
}

function StripeName({ stripe, y }: { stripe: Stripe; y: (temp: number) => number }) {
  const { name, middle, tolerance } = stripe;
  return (
    <>
      <path
        className="stroke-print"
        d={`M220 ${y(middle + tolerance)}h6V${y(middle - tolerance)}h-6`}
      />
      <text className="fill-print text-scale font-semibold" x="233" y={y(middle) - 3}>
        {name}
      </text>
      <text className="fill-print text-scale" x="233" y={y(middle) + 12}>
        {band(middle, tolerance)}
      </text>
    </>
  );
}
