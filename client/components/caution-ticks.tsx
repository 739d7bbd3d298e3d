import { useState } from 'react';
import { RUN_CAUTIONS } from '#shared/wording/safety-lines.ts';

type CautionTicksProps = {
  isDisabled?: boolean;
  /** How many are ticked now, of all. */
  onCount?: (ticked: number) => void;
  onAll: () => void;
};

/** The cautions before a run, each ticked by hand. */
export function CautionTicks({ isDisabled = false, onCount, onAll }: CautionTicksProps) {
  const [ticked, setTicked] = useState<ReadonlySet<string>>(new Set());

  function handleTick(caution: string, isTicked: boolean) {
    const next = new Set(ticked);
    if (isTicked) next.add(caution);
    else next.delete(caution);
    setTicked(next);
    onCount?.(next.size);
    if (next.size === RUN_CAUTIONS.length) onAll();
  }

  return (
    <ul>
      {RUN_CAUTIONS.map((caution) => (
        <li key={caution} className="border-b border-hair">
          <label className="words flex min-h-main cursor-pointer items-center gap-4 py-2 text-[1.0625rem] leading-[1.25] font-medium">
            <input
              type="checkbox"
              className="!size-7"
              checked={ticked.has(caution)}
              disabled={isDisabled}
              onChange={(event) => handleTick(caution, event.target.checked)}
            />
            <span>{caution}</span>
          </label>
        </li>
      ))}
    </ul>
  );
}
