import { useState } from 'react';
import { CHECK_CAUTIONS, RUN_CAUTIONS, SAFETY_LINE } from '#shared/wording/safety-lines.ts';
import { CautionTicks } from '../../components/caution-ticks.tsx';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { keepThing } from '../../device/this-device.ts';
import { timeWords } from '../../format/when.ts';
import type { VisitHere } from './use-visit.ts';

type SafetySectionProps = { visit: VisitHere; zone: string };

/** The cautions before a run. Each is ticked by hand; with the last one the visit keeps when. */
export function SafetySection({ visit, zone }: SafetySectionProps) {
  const { safetyTickedAtMs: tickedAtMs, mayRecord, unsent } = visit;
  const ticked = tickedAtMs === null ? 'not ticked yet' : `ticked ${timeWords(tickedAtMs, zone)}`;
  const state = unsent.safety ? `${ticked}, not sent yet` : ticked;
  return (
    <section aria-labelledby="safety">
      <SectionHead site id="safety" state={<span role="status">{state}</span>}>
        Safety first
      </SectionHead>
      {tickedAtMs === null && mayRecord ? (
        <CautionsToTick visitId={visit.id} />
      ) : (
        <PrintedCautions cautions={RUN_CAUTIONS} />
      )}
      <h3 className="words pt-4 pb-1 text-table font-semibold">Before you touch a terminal</h3>
      <PrintedCautions cautions={CHECK_CAUTIONS} />
      <p className="pt-3 text-small text-print">{SAFETY_LINE}</p>
    </section>
  );
}

function tickNow(visitId: string) {
  return keepThing('safety-ticks', { visitId, tickedAtMs: Date.now() });
}

function CautionsToTick({ visitId }: { visitId: string }) {
  const [isKeeping, setIsKeeping] = useState(false);
  const [error, setError] = useState<Error | null>(null);

  /** On the device first: it is ticked with or without a line to the shop. */
  function keep() {
    setIsKeeping(true);
    setError(null);
    tickNow(visitId)
      .catch(setError)
      .finally(() => setIsKeeping(false));
  }

  return (
    <>
      <CautionTicks isDisabled={isKeeping} onAll={keep} />
      {error && (
        <Notice kind="stop" role="alert" head={error.message} className="mt-3">
          <div className="pt-3">
            <Key size="site" onClick={keep}>
              Try again
            </Key>
          </div>
        </Notice>
      )}
    </>
  );
}

function PrintedCautions({ cautions }: { cautions: readonly string[] }) {
  return (
    <ul>
      {cautions.map((caution) => (
        <li
          key={caution}
          className="words border-b border-hair py-2.5 text-[1.0625rem] leading-[1.25] font-medium"
        >
          {caution}
        </li>
      ))}
    </ul>
  );
}
