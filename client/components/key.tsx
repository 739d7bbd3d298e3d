import type { ButtonHTMLAttributes } from 'react';
import { Link, type LinkProps } from 'react-router-dom';

const FACES = {
  plain: 'border-print bg-key text-ink',
  /** One a screen. */
  main: 'border-ink bg-ink text-paper',
  /** Only for what stops, or cannot be undone. */
  stop: 'border-stop bg-stop text-stop-on',
};

type KeyLook = {
  face?: keyof typeof FACES | undefined;
  size?: keyof typeof SIZES | undefined;
  className?: string | undefined;
};

const SIZES = {
  desk: 'min-h-key px-[22px] py-1.5',
  small: 'min-h-touch px-4 py-1',
  site: 'min-h-main px-[10px] py-1.5',
};

function keyClass({ face = 'plain', size = 'desk', className = '' }: KeyLook) {
  return `inline-flex cursor-pointer touch-manipulation items-center justify-center gap-[10px] rounded-key border-line text-center font-gothic text-press font-stretch-[96%] no-underline active:border-ink active:bg-ink active:text-paper disabled:cursor-default disabled:border-dashed disabled:border-print disabled:bg-transparent disabled:text-print ${FACES[face]} ${SIZES[size]} ${className}`;
}

type KeyProps = ButtonHTMLAttributes<HTMLButtonElement> & KeyLook;

/** A key on the instrument's panel: every button that does something loud. */
export function Key({ face, size, className, type = 'button', ...button }: KeyProps) {
  return <button type={type} className={keyClass({ face, size, className })} {...button} />;
}

/** A key that leads to another page. */
export function KeyLink({ face, size, className, ...link }: LinkProps & KeyLook) {
  return <Link className={keyClass({ face, size, className })} {...link} />;
}

/** A quiet action: an underlined word. */
export function Word({ className = '', type = 'button', ...button }: KeyProps) {
  return <button type={type} className={`word ${className}`} {...button} />;
}

export function WordLink({ className = '', ...link }: LinkProps) {
  return <Link className={`word ${className}`} {...link} />;
}
