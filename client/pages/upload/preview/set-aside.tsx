import type { ReadPreview } from '#shared/schemas/uploads.ts';

const SHOWN_AT_ONCE = 8;

/** Rows that do not count, each with its number and why; and what was put right, in words. */
export function SetAside({ preview }: { preview: ReadPreview }) {
  const { skippedRows, skippedCount, warnings } = preview;
  const first = skippedRows.slice(0, SHOWN_AT_ONCE);
  const more = skippedRows.slice(SHOWN_AT_ONCE);
  return (
    <>
      {warnings.length > 0 && (
        <ul>
          {warnings.map(({ code, row, message }, index) => (
            <li key={`${code}-${row}-${index}`} className="border-b border-hair py-2 text-[1rem]">
              {message}
            </li>
          ))}
        </ul>
      )}
      {skippedCount === 0 ? (
        <p className="py-2 text-[1rem]">No row was set aside.</p>
      ) : (
        <ul>
          {first.map((skipped) => (
            <SkippedRow key={skipped.row} {...skipped} />
          ))}
        </ul>
      )}
      {more.length > 0 && (
        <details>
          <summary className="word">{skippedCount - first.length} more rows</summary>
          <ul className="max-h-96 overflow-y-auto">
            {more.map((skipped) => (
              <SkippedRow key={skipped.row} {...skipped} />
            ))}
          </ul>
          {skippedCount > skippedRows.length && (
            <p className="py-2 text-small text-print">
              The first {skippedRows.length.toLocaleString('en-US')} are listed.
            </p>
          )}
        </details>
      )}
    </>
  );
}

function SkippedRow({ row, why }: { row: number; why: string }) {
  return (
    <li className="words grid grid-cols-[92px_minmax(0,1fr)] gap-3 border-b border-hair py-2 text-[1rem] leading-[1.3]">
      <span className="fig font-semibold">Row {row.toLocaleString('en-US')}</span>
      <span className="wrap-anywhere">{why}</span>
    </li>
  );
}
