type ShrinkBarProps = {
  leftS: number;
  earliestS: number;
  latestS: number | null;
  limitWords: string;
};

const LEFT_PX = 16;
const PX_PER_S = 1.6;
const MOST_S = 180;

/** Time that is left as a bar which shrinks to the wall, its interval as a dimension line above. */
export function ShrinkBar({ leftS, earliestS, latestS, limitWords }: ShrinkBarProps) {
  const at = (timeS: number) => LEFT_PX + Math.min(MOST_S, Math.max(0, timeS)) * PX_PER_S;
  const from = at(earliestS);
  const to = at(latestS ?? MOST_S);
  return (
    <svg className="sw-shrink" viewBox="0 0 310 50" fill="none" aria-hidden="true">
      <path
        d="M16 8l-8 6.500M16 14.500l-8 6.500M16 21l-8 6.500M16 27.500l-8 6.500M16 34l-8 6.500"
        stroke="var(--stop)"
        strokeWidth="1.1"
      />
      <path d="M16 7V36" stroke="var(--stop)" strokeWidth="1.75" />
      <rect x={LEFT_PX} y="13" width={at(leftS) - LEFT_PX} height="13" fill="var(--ink)" />
      <path
        d={`M${from} 1V10M${to} 1V10M${from} 5.5H${to}`}
        stroke="var(--ink)"
        strokeWidth="1.5"
      />
      <path d={SCALE} stroke="var(--print)" />
      <g className="fig" fontSize="13" fill="var(--print)">
        <text x="16" y="48">
          {limitWords}
        </text>
        <text x="112" y="48" textAnchor="middle">
          1 min
        </text>
        <text x="208" y="48" textAnchor="middle">
          2 min
        </text>
        <text x="304" y="48" textAnchor="end">
          3 min
        </text>
      </g>
    </svg>
  );
}

const SCALE = Array.from({ length: 19 }, (_, i) => `M${16 + i * 16} 29v${i % 6 === 0 ? 8 : 4}`)
  .join('')
  .concat('M16 29H304');
