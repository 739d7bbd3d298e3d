import type { Analysis } from '#shared/analysis/analysis.ts';
import type { ReadPreview, Upload } from '#shared/schemas/uploads.ts';
import { wordNotJudged } from '#shared/wording/word-call.ts';
import { CallGlyphs } from '../../../components/glyphs.tsx';
import { Notice } from '../../../components/notice.tsx';
import { PageHeading } from '../../../components/page-heading.tsx';
import { sayBytes } from '../check-file.ts';
import { formatRunTime } from '../run-time.ts';

type PreviewHeadProps = { upload: Upload; preview: ReadPreview; hasErrors: boolean };

/** How much there is and what was found in it, before anything is kept. */
export function PreviewHead({ upload, preview, hasErrors }: PreviewHeadProps) {
  const { analysis, samples, durationS, skippedCount } = preview;
  const readings = `${samples.toLocaleString('en-US')} readings over ${formatRunTime(durationS)}`;
  return (
    <>
      <p className="lab wrap-anywhere">
        {upload.fileName} · {sayBytes(upload.bytes)} · not kept yet
      </p>
      <PageHeading className="pt-1" hasErrors={hasErrors} title={`Look over ${upload.fileName}`}>
        {readings}
      </PageHeading>
      <p className="words flex flex-wrap gap-x-3 pt-1.5 pb-4 text-[1.0625rem] font-medium">
        <span>{foundWords(analysis)}</span>
        {analysis.notJudged === null && <CallGlyphs calls={callsOf(analysis)} most={12} />}
        {skippedCount > 0 && (
          <span className="text-print">
            {skippedCount.toLocaleString('en-US')} row{skippedCount === 1 ? '' : 's'} set aside
          </span>
        )}
      </p>
      {analysis.outcome === 'stop' && (
        <Notice
          kind="stop"
          role="alert"
          head="Stop. Do not leave this machine heating."
          className="mb-4 max-w-form"
        >
          Accept the run to read why, and what to do first.
        </Notice>
      )}
    </>
  );
}

function callsOf({ cutOuts, resets }: Analysis) {
  return [...cutOuts, ...resets]
    .sort((a, b) => a.timeS - b.timeS)
    .flatMap(({ call }) => (call ? [call] : []));
}

function foundWords(analysis: Analysis): string {
  const { cutOuts, resets, notJudged } = analysis;
  const count = (n: number, word: string) => `${n} ${word}${n === 1 ? '' : 's'}`;
  const found = `${count(cutOuts.length, 'cut-out')}, ${count(resets.length, 'reset')}.`;
  const why = wordNotJudged(notJudged);
  return why ? `${found} ${why}` : found;
}
