import { DeskPage } from '../../components/frame.tsx';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Waiting } from '../../components/waiting.tsx';
import { sendNow, thisDevice, useSending } from '../../device/this-device.ts';
import { useKeptThings, type KeptByState } from '../../device/use-kept-things.ts';
import type { DevicePerson, KeptThing } from '../../device/device-db.ts';
import { momentWords } from '../../format/when.ts';
import { useNowMs } from '../../format/use-now.ts';
import { useSession } from '../frame/session-context.ts';
import { Conflict } from './conflict.tsx';
import { Refused } from './refused.tsx';
import { RunNoteConflict } from './run-note-conflict.tsx';
import { saveThings } from './save-things.ts';
import { groupThings, groupWords, OUTCOME_WORDS, textOf } from './unsent-words.ts';

/** What lies on this phone and is not with the shop: what waits, what clashes, what was turned down. */
export function UnsentPage() {
  const kept = useKeptThings();
  const { person, shop } = useSession();
  return (
    <DeskPage>
      <PageHeading>On this phone</PageHeading>
      <div className="max-w-form pt-1">
        {kept ? <Kept kept={kept} person={person} zone={shop.zone} /> : <Waiting>Looking…</Waiting>}
      </div>
    </DeskPage>
  );
}

type KeptProps = { kept: KeptByState; person: DevicePerson; zone: string };

function Kept({ kept, person, zone }: KeptProps) {
  const { unsent, conflict, refused } = kept;
  const all = [...unsent, ...conflict, ...refused];
  if (all.length === 0) {
    return (
      <Notice kind="done" role="status" head="Everything is with the shop." className="my-5">
        What you record without a signal is kept here and goes by itself.
      </Notice>
    );
  }
  return (
    <div className="grid gap-9 pt-2">
      {unsent.length > 0 && <Unsent unsent={unsent} zone={zone} />}
      {conflict.map((thing) =>
        thing.kind.startsWith('run-note') ? (
          <RunNoteConflict key={thing.id} thing={thing} zone={zone} />
        ) : (
          <Conflict key={thing.id} thing={thing} zone={zone} />
        ),
      )}
      {refused.map((thing) => (
        <Refused key={thing.id} thing={thing} />
      ))}
      <section>
        <SectionHead>A copy</SectionHead>
        <p className="py-3 text-body">A file with all of this, in case the phone is lost.</p>
        <Key onClick={() => void saveThings(thisDevice, person, all)}>Save to a file</Key>
      </section>
    </div>
  );
}

function Unsent({ unsent, zone }: { unsent: KeptThing[]; zone: string }) {
  const { isSending, outcome } = useSending();
  const nowMs = useNowMs();
  return (
    <section aria-labelledby="waiting">
      <SectionHead id="waiting" state={`${unsent.length} not sent yet`}>
        Waiting
      </SectionHead>
      <ul>
        {groupThings(unsent).map((group) => (
          <li key={group.key} className="border-b border-hair py-2.5">
            <span className="words block text-[1.0625rem] leading-[1.25] font-medium">
              {groupWords(group)}
              <span className="pl-3 text-print">
                {momentWords(group.things[0].madeAtMs, zone, nowMs)}
              </span>
            </span>
            <span className="block text-body whitespace-pre-line">{textOf(group.things[0])}</span>
          </li>
        ))}
      </ul>
      <div role="status" className="pt-3 text-body empty:hidden">
        {!isSending && outcome && outcome !== 'sent' && OUTCOME_WORDS[outcome]}
      </div>
      <div className="pt-3">
        <Key face="main" size="site" disabled={isSending} onClick={() => void sendNow()}>
          {isSending ? 'Sending…' : 'Send now'}
        </Key>
      </div>
    </section>
  );
}
