import { useState, useSyncExternalStore } from 'react';
import { KEEP_RATE_WORDS } from '#shared/recorder/keep-rate.ts';
import { SelectField } from '../../../components/field.tsx';
import { Key, Word } from '../../../components/key.tsx';
import { SectionHead } from '../../../components/section-head.tsx';
import { BAUD_RATES } from '../../../device/live/serial-probe.ts';
import type { LiveQuestion, LiveReading } from '../../../device/live/live-probe.ts';
import type { DeskView } from './create-live-desk.ts';
import { liveDesk } from './live-desk.ts';
import { silenceWords } from './probe-words.ts';

/** The live probe: chosen here, and what it reads. `isNamed`: which of the shop's probes it is has been said. */
export function ProbePart({ isNamed }: { isNamed: boolean }) {
  const desk = useSyncExternalStore(liveDesk.subscribe, liveDesk.view);
  const { probe, problem } = desk;
  return (
    <section aria-labelledby="live-probe" className="pt-5">
      <SectionHead site id="live-probe">
        Live probe
      </SectionHead>
      {problem && (
        <p role="alert" className="sw-problem">
          {problem}
        </p>
      )}
      {probe && probe.state.is !== 'ended' ? (
        <Linked {...{ probe, isNamed }} latest={desk.latest} />
      ) : (
        <Choosing why={probe?.state.is === 'ended' ? probe.state.why : null} />
      )}
    </section>
  );
}

function Choosing({ why }: { why: string | null }) {
  const [baudRate, setBaudRate] = useState<number>(9_600);
  return (
    <>
      <p className="pb-3 text-say">
        {why ?? 'A probe that speaks by itself can take the readings. The keys go on working.'}
      </p>
      <div className="grid gap-2.5">
        {liveDesk.hasBluetooth && (
          <Key size="site" onClick={() => void liveDesk.byBluetooth()}>
            Connect a probe by Bluetooth
          </Key>
        )}
        {liveDesk.hasCable && (
          <>
            <div className="border border-print">
              <SelectField
                label="Speed of the cable, bit/s"
                name="baud"
                value={baudRate}
                onChange={(event) => setBaudRate(Number(event.target.value))}
              >
                {BAUD_RATES.map((each) => (
                  <option key={each} value={each}>
                    {each.toLocaleString('en-US')}
                  </option>
                ))}
              </SelectField>
            </div>
            <Key size="site" onClick={() => void liveDesk.byCable(baudRate)}>
              Connect a probe by cable
            </Key>
          </>
        )}
      </div>
    </>
  );
}

type LinkedProps = {
  probe: NonNullable<DeskView['probe']>;
  latest: LiveReading | null;
  isNamed: boolean;
};

function Linked({ probe, latest, isNamed }: LinkedProps) {
  const { state } = probe;
  return (
    <>
      <div className="flex items-baseline justify-between gap-4 border-b border-hair py-2">
        <span className="words min-w-0 text-table font-semibold">{probe.name}</span>
        {latest && (
          <b className="fig shrink-0 text-[1.875rem] leading-none font-semibold">
            {latest.temp.toFixed(1)}
            {` °${latest.unit}`}
          </b>
        )}
      </div>
      <p role="status" className="py-2 text-body">
        {stateWords(probe, latest)}
      </p>
      {state.is === 'asks' && <Question question={state.question} />}
      {!isNamed && (
        <p className="pb-2 text-body">
          Choose under Probe which of the shop’s it is, here or at the end: its accuracy goes into
          every call.
        </p>
      )}
      <p className="text-small text-print">{KEEP_RATE_WORDS}</p>
      <Word onClick={() => liveDesk.letGo()}>Let go of this probe</Word>
    </>
  );
}

function Question({ question }: { question: LiveQuestion }) {
  return (
    <div role="group" aria-label={question.words} className="grid gap-2 pb-3">
      {question.options.map(({ key, words }) => (
        <Key key={key} size="site" onClick={() => liveDesk.answer(key)}>
          {words}
        </Key>
      ))}
    </div>
  );
}

function stateWords({ state, silence, by }: LinkedProps['probe'], latest: LiveReading | null) {
  switch (state.is) {
    case 'connecting':
      return 'Connecting…';
    case 'lost':
      return 'Out of reach. It is tried again by itself.';
    case 'asks':
      return state.question.words;
    case 'ended':
      return '';
    case 'reading':
      if (silence.count > 0) {
        const speed = by === 'cable' && silence.why === 'unread' ? ' Is the speed right?' : '';
        return silenceWords(silence) + speed;
      }
      return latest ? 'It reads.' : 'Linked. No reading has come yet.';
  }
}
