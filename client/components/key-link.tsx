import { Link, type LinkProps } from 'react-router-dom';
import { keyClass, type KeyLook } from './key-face.ts';

/** A key that leads to another page. */
export function KeyLink({ face, size, className, ...link }: LinkProps & KeyLook) {
  return <Link className={keyClass({ face, size, className })} {...link} />;
}

/** A quiet way to another page. */
export function WordLink({ className = '', ...link }: LinkProps) {
  return <Link className={`word ${className}`} {...link} />;
}
