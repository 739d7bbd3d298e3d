import { useState } from 'react';
import { Link } from 'react-router-dom';
import { takeNewVersion, useNewVersion } from '../../device/versions.ts';
import { usePageAge } from '../../device/page-age.ts';
import { useSending, useUnsent } from '../../device/this-device.ts';
import { Word } from '../../components/key.tsx';
import { ageWords, othersWords, unsentWords } from '../unsent/unsent-words.ts';

/** What is on this phone and not with the shop yet, on every screen; nothing where there is nothing to say. */
export function DeviceLine({ zone }: { zone: string }) {
  const unsent = useUnsent();
  const { isSending } = useSending();
  const ageMs = usePageAge();
  const waiting = unsentWords(unsent);
  const others = unsent.others.map(othersWords);
  return (
    <aside
      aria-label="On this phone"
      className="sticky top-0 z-10 bg-paper px-4 font-gothic text-[0.9375rem] leading-[1.25] font-medium desk:px-12 print:hidden [&>*]:border-b [&>*]:border-hair [&>*:empty]:hidden"
    >
      <div role="status" className="flex flex-wrap items-center gap-x-5">
        {waiting && (
          <Link to="/unsent" className="inline-flex min-h-touch items-center font-semibold">
            {waiting}
          </Link>
        )}
        {waiting && isSending && <span className="text-print">Sending…</span>}
        {ageMs !== null && (
          <span className="inline-flex min-h-touch items-center">{ageWords(ageMs, zone)}</span>
        )}
        {others.map((words) => (
          <span key={words} className="inline-flex min-h-touch items-center">
            {words}
          </span>
        ))}
      </div>
      <NewVersion />
    </aside>
  );
}

function NewVersion() {
  const isReady = useNewVersion();
  const [isHeld, setIsHeld] = useState(false);
  if (!isReady) return null;
  const take = async () => setIsHeld((await takeNewVersion()) === 'recording');
  return (
    <div role="status" className="flex min-h-touch flex-wrap items-center gap-x-5">
      A new version is ready.
      <Word onClick={() => void take()}>Use it now</Word>
      {isHeld && <span className="text-print">A run is being recorded; end it first.</span>}
    </div>
  );
}
