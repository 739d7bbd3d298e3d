import { useState, type ReactNode } from 'react';
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
      className="grid px-4 font-gothic text-[15px] leading-[1.25] font-medium empty:hidden desk:px-12 print:hidden [&>*]:border-b [&>*]:border-hair"
    >
      <div role="status" className="grid empty:hidden">
        {waiting && (
          <Line>
            <Link to="/unsent" className="inline-flex min-h-touch items-center font-semibold">
              {waiting}
            </Link>
            {isSending && <span className="text-print">Sending…</span>}
          </Line>
        )}
        {others.map((words) => (
          <Line key={words}>{words}</Line>
        ))}
        {ageMs !== null && <Line>{ageWords(ageMs, zone)}</Line>}
      </div>
      <NewVersion />
    </aside>
  );
}

function Line({ children }: { children: ReactNode }) {
  return <p className="flex min-h-touch flex-wrap items-center gap-x-4">{children}</p>;
}

function NewVersion() {
  const isReady = useNewVersion();
  const [isHeld, setIsHeld] = useState(false);
  if (!isReady) return null;
  const take = async () => setIsHeld((await takeNewVersion()) === 'recording');
  return (
    <div role="status">
      <Line>
        A new version is ready.
        <Word onClick={() => void take()}>Use it now</Word>
        {isHeld && <span className="text-print">A run is being recorded; end it first.</span>}
      </Line>
    </div>
  );
}
