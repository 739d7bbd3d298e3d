import { useMemo } from 'react';
import type { SharedRun } from '#shared/schemas/shares.ts';
import { formatBand, formatMoment, formatRated } from '#shared/wording/format.ts';
import { SmallStrip } from '../../chart/small-strip.tsx';
import { letterNotes, stripOfRun } from '../../chart/strip-of-run.ts';

const BAND_NAMES = { opens: 'heat should stop here', closes: 'and come back here' };

/** The run in plain words: one chart, the stripes named on it, the notes under it. */
export function CustomerChart({ shared, sentence }: { shared: SharedRun; sentence: string }) {
  const { analysis, judgedBy, notes, trace, unit } = shared;
  const strip = useMemo(
    () => stripOfRun({ analysis, bands: judgedBy, marks: [], notes }),
    [analysis, judgedBy, notes],
  );
  const chart = { strip, trace, unit, name: sentence, bandNames: judgedBy && BAND_NAMES };
  return (
    <figure className="pt-5 print:pt-2" aria-label="The test as a chart">
      <div className="-mx-5 border-y border-print bg-strip desk:hidden print:hidden">
        <SmallStrip {...chart} />
      </div>
      <div className="hidden border-y border-print bg-strip desk:block print:block">
        <SmallStrip {...chart} widthPx={720} heightPx={290} />
      </div>
      <figcaption className="lab pt-3 print:pt-1 print:text-[12px]">{captionOf(shared)}</figcaption>
      <Notes notes={notes} />
    </figure>
  );
}

function captionOf({ judgedBy, unit }: SharedRun): string {
  const axes = `°${unit} up the side, minutes along the foot.`;
  if (!judgedBy) return axes;
  const { opensC, opensTolK, closesC, closesTolK, highLimitC } = judgedBy;
  return `${axes} The stripes are what this machine is made to do: stop the heat at ${formatBand(opensC, opensTolK, unit)}, bring it back at ${formatBand(closesC, closesTolK, unit)}. The red line at ${formatRated(highLimitC, unit)} is where the air must not go.`;
}

function Notes({ notes }: Pick<SharedRun, 'notes'>) {
  if (notes.length === 0) return null;
  return (
    <ul className="mt-3 border-t border-print print:mt-1.5 print:columns-2 print:gap-10">
      {letterNotes(notes).map((note) => (
        <li
          key={note.letter}
          className="grid break-inside-avoid grid-cols-[26px_minmax(0,1fr)] border-b border-hair py-2 text-[1.0625rem] leading-[1.35] print:py-0.5 print:text-[13px]"
        >
          <b className="font-gothic text-[1rem] print:text-[13px]">{note.letter}</b>
          <span>
            {note.text} <span className="fig text-print">at {formatMoment(note.timeS)}</span>
          </span>
        </li>
      ))}
    </ul>
  );
}
