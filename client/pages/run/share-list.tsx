import { useState } from 'react';
import type { Share } from '#shared/schemas/shares.ts';
import { useRevokeShare } from '../../api/shares.ts';
import { Word } from '../../components/key.tsx';
import { Slip } from '../../components/slip.tsx';
import { Failed } from '../../components/waiting.tsx';
import { momentWords } from '../../format/when.ts';

type ShareListProps = { runId: string; shares: Share[]; zone: string };

/** Every link that was made: by whom, until when, opened or not, taken back or not. */
export function ShareList({ runId, shares, zone }: ShareListProps) {
  const revoke = useRevokeShare(runId);
  const [leaving, setLeaving] = useState<Share | null>(null);
  const [nowMs] = useState(() => Date.now());
  if (shares.length === 0) return <p className="py-2 text-body">No link was made yet.</p>;
  return (
    <>
      <h3 className="lab pt-4 pb-1">Links made</h3>
      <ul>
        {shares.map((share) => (
          <li
            key={share.id}
            className="words flex flex-wrap items-center justify-between gap-x-6 border-t border-hair py-1 text-[1rem] leading-[1.35]"
          >
            <p className="py-1.5">
              Made {momentWords(share.madeAtMs, zone, nowMs)} by {share.by}.{' '}
              <strong className="font-semibold">{stateWords(share, zone, nowMs)}</strong>
            </p>
            {isOpen(share, nowMs) && <Word onClick={() => setLeaving(share)}>Take back</Word>}
          </li>
        ))}
      </ul>
      {revoke.isError && <Failed error={revoke.error} />}
      {leaving && (
        <Slip
          question="Take this link back?"
          doer="Take back"
          isStop
          isBusy={revoke.isPending}
          onDo={() => revoke.mutate(leaving.id, { onSettled: () => setLeaving(null) })}
          onBack={() => setLeaving(null)}
        >
          <p>
            Whoever has it sees your phone number instead of the run. It cannot be opened again.
          </p>
        </Slip>
      )}
    </>
  );
}

function isOpen(share: Share, nowMs: number): boolean {
  return share.revokedAtMs === null && share.expiresAtMs > nowMs;
}

function stateWords(share: Share, zone: string, nowMs: number): string {
  const when = (atMs: number) => momentWords(atMs, zone, nowMs);
  const opened = share.openedAtMs === null ? 'Not opened' : `Opened ${when(share.openedAtMs)}`;
  if (share.revokedAtMs !== null) return `${opened}; taken back ${when(share.revokedAtMs)}.`;
  if (share.expiresAtMs <= nowMs) return `${opened}; expired ${when(share.expiresAtMs)}.`;
  return `${opened}; opens until ${when(share.expiresAtMs)}.`;
}
