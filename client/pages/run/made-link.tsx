import { useState } from 'react';
import { Key } from '../../components/key.tsx';
import { longDateWords } from '../../format/when.ts';
import type { MadeShare } from './shares.tsx';

type MadeLinkProps = { share: MadeShare; zone: string; shopName: string };

/** The new link, shown this once: copy it, or hand it to the phone's own share sheet. */
export function MadeLink({ share, zone, shopName }: MadeLinkProps) {
  const [said, setSaid] = useState('');
  const canHandOver = typeof navigator.share === 'function';

  async function handleCopy() {
    try {
      await navigator.clipboard.writeText(share.url);
      setSaid('Copied.');
    } catch {
      setSaid('This browser does not let the page copy. Mark the link and copy it by hand.');
    }
  }

  async function handleShare() {
    try {
      await navigator.share({ title: `Your dryer, by ${shopName}`, url: share.url });
    } catch (error) {
      const isCancelled = error instanceof DOMException && error.name === 'AbortError';
      setSaid(isCancelled ? '' : 'The phone did not take the link. Copy it instead.');
    }
  }

  return (
    <div className="max-w-form border-t-line border-b border-ink py-3">
      <label className="block">
        <span className="lab">
          The link, shown this once. It opens until {longDateWords(share.expiresAtMs, zone)}.
        </span>
        <input
          readOnly
          value={share.url}
          onFocus={(event) => event.currentTarget.select()}
          className="fig mt-1 block min-h-touch w-full border border-print bg-strip px-3 text-[1.0625rem]"
        />
      </label>
      <div className="flex flex-wrap items-center gap-2 pt-3">
        <Key onClick={handleCopy}>Copy the link</Key>
        {canHandOver && <Key onClick={handleShare}>Send it</Key>}
        <span role="status" className="text-small">
          {said}
        </span>
      </div>
    </div>
  );
}
