import type { RunPage } from '#shared/schemas/runs.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatMoment, formatSpan, formatStep } from '#shared/wording/format.ts';
import { runFileUrl } from '../../api/runs.ts';
import { SectionHead } from '../../components/section-head.tsx';

/** How the file was read: what was set aside and why; and the file itself, untouched. */
export function HowRead({ run, unit }: { run: RunPage; unit: DisplayUnit }) {
  const { analysis } = run.analysis;
  return (
    <section aria-labelledby="how-read">
      <SectionHead id="how-read">How the file was read</SectionHead>
      <p className="max-w-read py-3 text-[1rem] leading-[1.42]">
        {run.samples.toLocaleString('en-US')} readings over {formatSpan(run.durationS)} from the
        column “{run.channel}”, in {run.channelUnit === 'K' ? 'kelvin' : `°${run.channelUnit}`}.{' '}
        {setAsideWords(run)} {spikeWords(analysis.spikes)} A reading scatters by{' '}
        {formatStep(analysis.noiseK, unit)} (standard deviation).
      </p>
      <ListOf
        name="Put right or worth knowing"
        rows={[
          ...run.warnings.map(({ row, message }) => ({ at: rowWords(row), said: message })),
          ...analysis.gaps.map(({ fromS, toS }) => ({
            at: formatMoment(fromS),
            said: `No readings for ${formatSpan(toS - fromS)}. The trace is not joined across it.`,
          })),
        ]}
      />
      <ListOf
        name="Rows set aside"
        rows={run.skippedRows.map(({ row, why }) => ({ at: rowWords(row), said: why }))}
        more={run.skippedCount - run.skippedRows.length}
      />
      <p className="pt-2">
        <a className="word" href={runFileUrl(run.id)} download={run.file.name}>
          {run.file.name}, {bytesWords(run.file.bytes)}, as it came
        </a>
      </p>
      <p className="text-[0.8125rem] leading-[1.4] break-all text-print">
        SHA-256 {run.file.sha256}
      </p>
    </section>
  );
}

const MOST_ROWS = 8;

type Row = { at: string; said: string };

function ListOf({ name, rows, more = 0 }: { name: string; rows: Row[]; more?: number }) {
  if (rows.length === 0) return null;
  const hidden = rows.length - MOST_ROWS + more;
  return (
    <>
      <h3 className="lab pt-2 pb-1">{name}</h3>
      <ul>
        {rows.slice(0, MOST_ROWS).map(({ at, said }, i) => (
          <li
            key={i}
            className="grid grid-cols-[80px_minmax(0,1fr)] border-t border-hair py-1.5 text-[1rem] leading-[1.35]"
          >
            <span className="fig">{at}</span>
            <span className="break-words">{said}</span>
          </li>
        ))}
      </ul>
      {hidden > 0 && (
        <p className="border-t border-hair py-1.5 text-small text-print">
          and {hidden.toLocaleString('en-US')} more
        </p>
      )}
    </>
  );
}

function setAsideWords({ skippedCount }: RunPage): string {
  if (skippedCount === 0) return 'No row was set aside.';
  return skippedCount === 1
    ? 'One row was set aside.'
    : `${skippedCount.toLocaleString('en-US')} rows were set aside.`;
}

function spikeWords(spikes: number): string {
  if (spikes === 0) return '';
  return spikes === 1
    ? 'One wild reading is kept but not counted.'
    : `${spikes} wild readings are kept but not counted.`;
}

function rowWords(row: number | null): string {
  return row === null ? 'all' : `row ${row}`;
}

function bytesWords(bytes: number): string {
  if (bytes < 1000) return `${bytes} bytes`;
  if (bytes < 1_000_000) return `${Math.round(bytes / 1000)} kB`;
  return `${(bytes / 1_000_000).toFixed(1)} MB`;
}
