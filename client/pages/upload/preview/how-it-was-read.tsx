import type { ReadPreview, Upload } from '#shared/schemas/uploads.ts';
import { SectionHead } from '../../../components/section-head.tsx';
import { unitWords } from '../../../format/rating-words.ts';
import { ColumnsTable } from './columns-table.tsx';
import { delimiterWords } from './corrections.ts';
import { FirstRows } from './first-rows.tsx';
import { ReadingFacts } from './reading-facts.tsx';
import { SetAside } from './set-aside.tsx';

/** Enough to see the clock step and the temperature move. */
const SHOWN_ROWS = 8;

type HowItWasReadProps = { upload: Upload; preview: ReadPreview };

export function HowItWasRead({ upload, preview }: HowItWasReadProps) {
  const { skippedCount, warnings } = preview;
  const aside = skippedCount === 1 ? '1 row' : `${skippedCount.toLocaleString('en-US')} rows`;
  return (
    <div className="grid content-start gap-9">
      <section aria-labelledby="as-read">
        <SectionHead site id="as-read" state="change what is wrong">
          How it was read
        </SectionHead>
        <div className="pt-2">
          <ReadingFacts upload={upload} preview={preview} />
        </div>
        <p className="words pt-2 text-small text-print">
          A {delimiterWords(preview.delimiter)} between columns.
          {preview.startedAt && ` The first reading says ${preview.startedAt}.`}
        </p>
      </section>
      <section aria-labelledby="first-rows">
        <SectionHead site id="first-rows" state={`row 1 is the file’s first line`}>
          First rows
        </SectionHead>
        <FirstRows
          rows={preview.preview.slice(0, SHOWN_ROWS)}
          caption="The first rows as understood"
          unit={unitWords(preview.channelUnit)}
        />
      </section>
      <section aria-labelledby="columns">
        <SectionHead site id="columns">
          Columns
        </SectionHead>
        <ColumnsTable columns={preview.columns} channel={preview.channel} />
      </section>
      <section aria-labelledby="aside">
        <SectionHead site id="aside" state={skippedCount > 0 && aside}>
          {warnings.length > 0 ? 'Set aside and put right' : 'Set aside'}
        </SectionHead>
        <SetAside preview={preview} />
      </section>
    </div>
  );
}
