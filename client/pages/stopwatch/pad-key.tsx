import type { ReactNode } from 'react';
import { usePress } from './press.ts';

type PadKeyProps = {
  area: string;
  look?: 'figure' | 'word' | 'hot';
  /** Where what it says is not enough. */
  name?: string;
  isDisabled?: boolean;
  onPress: (downMonoMs: number) => void;
  children: ReactNode;
};

const LOOKS = { figure: '', word: 'sw-key-word', hot: 'sw-key-word sw-key-hot' };

/** A key of the pad: 64 px or more, stamped when the finger goes down, taken when it is lifted. */
export function PadKey({
  area,
  look = 'figure',
  name,
  isDisabled = false,
  onPress,
  children,
}: PadKeyProps) {
  const press = usePress(onPress);
  return (
    <button
      type="button"
      className={`sw-key ${LOOKS[look]}`}
      style={{ gridArea: area }}
      aria-label={name}
      disabled={isDisabled}
      {...press}
    >
      {children}
    </button>
  );
}
