import type { Paint } from './paint-shapes.ts';
import { INKS, type Ink } from './shapes.ts';

/** The tokens that hold under an element now: day, night or print. */
export function readPaint(element: Element): Paint {
  const style = getComputedStyle(element);
  const token = (name: string) => style.getPropertyValue(`--${name}`).trim();
  const colours = Object.fromEntries(INKS.map((ink) => [ink, token(ink)])) as Record<Ink, string>;
  return { colours };
}

const CHART_FONTS = ['400', '600', '700']
  .map((weight) => `${weight} 14px 'FK Gothic'`)
  .concat("400 14px 'FK Text'");

/** Calls back whenever the tokens may have changed. Returns what ends it. */
export function watchPaint(onChange: () => void): () => void {
  const themes = new MutationObserver(onChange);
  themes.observe(document.documentElement, { attributeFilter: ['data-theme', 'class'] });
  const print = matchMedia('print');
  print.addEventListener('change', onChange);
  let isWatching = true;
  // A canvas does not ask for its fonts early enough: they are fetched by name, then it is laid down again.
  void Promise.allSettled(CHART_FONTS.map((font) => document.fonts.load(font))).then(
    () => isWatching && onChange(),
  );
  return () => {
    isWatching = false;
    themes.disconnect();
    print.removeEventListener('change', onChange);
  };
}
