const FACES = {
  plain: 'border-print bg-key text-ink',
  /** One a screen. */
  main: 'border-ink bg-ink text-paper',
  /** Only for what stops, or cannot be undone. */
  stop: 'border-stop bg-stop text-stop-on',
};

export type KeyLook = {
  face?: keyof typeof FACES | undefined;
  size?: keyof typeof SIZES | undefined;
  className?: string | undefined;
};

const SIZES = {
  desk: 'min-h-key px-[22px] py-1.5',
  small: 'min-h-touch px-4 py-1',
  site: 'min-h-main px-[10px] py-1.5',
};

/** How a key looks, whether it is a button or leads elsewhere. */
export function keyClass({ face = 'plain', size = 'desk', className = '' }: KeyLook) {
  return `inline-flex cursor-pointer touch-manipulation items-center justify-center gap-[10px] rounded-key border-line text-center font-gothic text-press font-stretch-[96%] no-underline active:border-ink active:bg-ink active:text-paper disabled:cursor-default disabled:border-dashed disabled:border-print disabled:bg-transparent disabled:text-print ${FACES[face]} ${SIZES[size]} ${className}`;
}
