import type { ButtonHTMLAttributes } from 'react';
import { keyClass, type KeyLook } from './key-face.ts';

type KeyProps = ButtonHTMLAttributes<HTMLButtonElement> & KeyLook;

/** A key on the instrument's panel: every button that does something loud. */
export function Key({ face, size, className, type = 'button', ...button }: KeyProps) {
  return <button type={type} className={keyClass({ face, size, className })} {...button} />;
}

/** A quiet action: an underlined word. */
export function Word({ className = '', type = 'button', ...button }: KeyProps) {
  return <button type={type} className={`word ${className}`} {...button} />;
}
