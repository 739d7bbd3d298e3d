import type { Call } from '#shared/analysis/analysis.ts';

type GlyphProps = { className?: string };

function Glyph({
  className = 'size-[18px]',
  children,
}: GlyphProps & { children: React.ReactNode }) {
  return (
    <svg
      className={`${className} inline-block shrink-0 overflow-visible align-[-0.2em]`}
      viewBox="0 0 18 18"
      fill="none"
      aria-hidden="true"
    >
      {children}
    </svg>
  );
}

/** Inside: a solid disc. */
export function InsideGlyph(props: GlyphProps) {
  return (
    <Glyph {...props}>
      <circle className="fill-ink" cx="9" cy="9" r="4.800" />
    </Glyph>
  );
}

/** Too close to call: an open ring. */
export function TooCloseGlyph(props: GlyphProps) {
  return (
    <Glyph {...props}>
      <circle className="stroke-ink" cx="9" cy="9" r="4.800" strokeWidth="2" />
    </Glyph>
  );
}

/** Outside: a struck ring, also the mark of a fault in a form. */
export function OutsideGlyph(props: GlyphProps) {
  return (
    <Glyph {...props}>
      <circle className="stroke-stop" cx="9" cy="9" r="4.800" strokeWidth="2" />
      <path className="stroke-stop" d="M0.900 17.100L17.100 0.900" strokeWidth="2.250" />
    </Glyph>
  );
}

/** Within the allowance: a disc whose upper half is open (the lower half for a reset). */
export function AllowanceGlyph({
  open = 'upper',
  ...props
}: GlyphProps & { open?: 'upper' | 'lower' }) {
  const filled =
    open === 'upper'
      ? 'M4.200 9a4.800 4.800 0 0 0 9.600 0z'
      : 'M4.200 9a4.800 4.800 0 0 1 9.600 0z';
  return (
    <Glyph {...props}>
      <circle className="stroke-ink" cx="9" cy="9" r="4.800" strokeWidth="2" />
      <path className="fill-ink" d={filled} />
    </Glyph>
  );
}

/** The shape of a call. The words stand beside it, or `CallGlyphs` reads them out. */
export function CallGlyph({ call, ...props }: GlyphProps & { call: Call }) {
  if (call === 'inside') return <InsideGlyph {...props} />;
  if (call === 'outside') return <OutsideGlyph {...props} />;
  return call === 'too-close' ? <TooCloseGlyph {...props} /> : <AllowanceGlyph {...props} />;
}

const CALL_WORDS: Record<Call, string> = {
  inside: 'inside',
  outside: 'outside',
  'within-allowance': 'within the allowance',
  'too-close': 'too close to call',
};

/** The calls of a run in a row, read out as a count of each. */
export function CallGlyphs({ calls, most = 6 }: { calls: Call[]; most?: number }) {
  const counts = (Object.keys(CALL_WORDS) as Call[])
    .map((call) => ({ call, count: calls.filter((other) => other === call).length }))
    .filter(({ count }) => count > 0)
    .map(({ call, count }) => `${count} ${CALL_WORDS[call]}`);
  const shown = calls.slice(0, most);
  return (
    <span className="whitespace-nowrap">
      <span className="sr-only">{counts.join(', ') || 'no point judged'}</span>
      {shown.map((call, index) => (
        <CallGlyph key={index} call={call} className="-mr-px size-[16px]" />
      ))}
      {calls.length > most && (
        <span aria-hidden="true" className="fig text-small pl-1 text-print">
          +{calls.length - most}
        </span>
      )}
    </span>
  );
}
