import type { DisplayUnit } from '#shared/units.ts';
import type { ReadPreview } from '#shared/schemas/uploads.ts';
import { SmallStrip } from '../../../chart/small-strip.tsx';
import { stripOfRun } from '../../../chart/strip-of-run.ts';
import type { Bands } from '../../../chart/strip.ts';
import { useWidth } from '../../../components/use-width.ts';
import { SMALL_MARGINS } from '../../../chart/sheet.ts';
import { formatRunTime } from '../run-time.ts';
import { SpanHandle } from './span-handle.tsx';
import { shareOf } from './strip-place.ts';

export type KeptSpan = { label: string; fromS: number; toS: number };

type RecordStripProps = {
  preview: ReadPreview;
  bands: Bands | null;
  unit: DisplayUnit;
  /** In order of the form; a span whose times cannot be read is not there. */
  spans: (KeptSpan | null)[];
  onMove: (index: number, end: 'fromS' | 'toS', timeS: number) => void;
};

const DESK_FROM_PX = 760;

/** The whole record on paper. What no run takes is veiled; each run's ends can be dragged, or moved by key. */
export function RecordStrip({ preview, bands, unit, spans, onMove }: RecordStripProps) {
  const { element, widthPx } = useWidth<HTMLDivElement>(390);
  const { analysis, trace, durationS } = preview;
  const kept = spans.filter((span) => span !== null);
  const found = `${analysis.cutOuts.length} cut-outs and ${analysis.resets.length} resets found`;
  return (
    <div
      ref={element}
      className="relative touch-pan-y overflow-x-clip border-y border-print bg-strip"
    >
      <SmallStrip
        strip={stripOfRun({ analysis, bands, marks: [], notes: [] })}
        trace={trace}
        unit={unit}
        name={`The whole record, ${formatRunTime(durationS)} long, ${found}.`}
        bandNames={bands && { opens: 'opens', closes: 'closes' }}
        widthPx={widthPx}
        heightPx={widthPx >= DESK_FROM_PX ? 340 : 260}
      />
      <Veils kept={kept} durationS={durationS} widthPx={widthPx} />
      {spans.map(
        (span, index) =>
          span && (
            <SpanEnds
              key={index}
              span={span}
              durationS={durationS}
              widthPx={widthPx}
              onMove={(end, timeS) => onMove(index, end, timeS)}
            />
          ),
      )}
    </div>
  );
}

type Placed = { durationS: number; widthPx: number };

/** Over each stretch that no run takes. */
function Veils({ kept, durationS, widthPx }: Placed & { kept: KeptSpan[] }) {
  const { top, bottom } = SMALL_MARGINS;
  return gapsBetween(kept, durationS).map(({ fromS, toS }) => {
    const left = shareOf(fromS, durationS, widthPx);
    const width = shareOf(toS, durationS, widthPx) - left;
    return (
      <div
        key={fromS}
        aria-hidden="true"
        className="pointer-events-none absolute bg-deck/85"
        style={{ left: `${left * 100}%`, width: `${width * 100}%`, top, bottom }}
      />
    );
  });
}

function gapsBetween(kept: KeptSpan[], durationS: number): { fromS: number; toS: number }[] {
  const gaps = [];
  let reachedS = 0;
  for (const { fromS, toS } of [...kept].sort((a, b) => a.fromS - b.fromS)) {
    if (fromS > reachedS) gaps.push({ fromS: reachedS, toS: fromS });
    reachedS = Math.max(reachedS, toS);
  }
  if (reachedS < durationS) gaps.push({ fromS: reachedS, toS: durationS });
  return gaps;
}

type SpanEndsProps = Placed & {
  span: KeptSpan;
  onMove: (end: 'fromS' | 'toS', timeS: number) => void;
};

function SpanEnds({ span, durationS, widthPx, onMove }: SpanEndsProps) {
  const { fromS, toS, label } = span;
  const place = { durationS, widthPx };
  return (
    <>
      <SpanHandle
        {...place}
        name={`Start of ${label}`}
        side="start"
        timeS={fromS}
        bounds={{ lowS: 0, highS: Math.max(toS - 1, 0) }}
        onMove={(timeS) => onMove('fromS', timeS)}
      />
      <SpanHandle
        {...place}
        name={`End of ${label}`}
        side="end"
        timeS={toS}
        bounds={{ lowS: fromS + 1, highS: durationS }}
        onMove={(timeS) => onMove('toS', timeS)}
      />
    </>
  );
}
