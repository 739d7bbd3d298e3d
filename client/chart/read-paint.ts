import type { Paint } from './paint-shapes.ts';
import { INKS, type Ink } from './shapes.ts';

/** The tokens that hold under an element now: day, night or print. */
export function readPaint(element: Element): Paint {
  const style = getComputedStyle(element);
  const token = (name: string) => style.getPropertyValue(`--${name}`).trim();
  const colours = Object.fromEntries(INKS.map((ink) => [ink, token(ink)])) as Record<Ink, string>;
  return { colours };
}

/** Calls back whenever the tokens may have changed. Returns what ends it. */
export function watchPaint(onChange: () => void): () => void {
  const themes = new MutationObserver(onChange);
  themes.observe(document.documentElement, { attributeFilter: ['data-theme', 'class'] });
  const print = matchMedia('print');
  print.addEventListener('change', onChange);
  let isWatching = true;
  void document.fonts.ready.then(() => isWatching && onChange());
  return () => {
    isWatching = false;
    themes.disconnect();
    print.removeEventListener('change', onChange);
  };
}
