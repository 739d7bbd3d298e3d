/** The colours are variables of client/styles.css, so day, night and print share one set of class names. */
const token = (name) => `var(--${name})`;

/** @type {import('tailwindcss').Config} */
export default {
  content: ['./index.html', './client/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="night"]'],
  theme: {
    // Replaced, not extended: a colour that is neither an ink nor a ground cannot be typed.
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: token('paper'),
      strip: token('strip'),
      deck: token('deck'),
      key: token('key'),
      ink: token('ink'),
      print: token('print'),
      rule: token('rule'),
      hair: token('hair'),
      grid: { major: token('grid-major'), minor: token('grid-minor') },
      band: {
        opens: token('band-opens'),
        closes: token('band-closes'),
        edge: token('band-edge'),
      },
      pen2: token('pen2'),
      stop: { DEFAULT: token('stop'), on: token('on-stop'), tint: token('stop-tint') },
      watch: { DEFAULT: token('watch'), tint: token('watch-tint') },
      focus: token('focus'),
    },
    fontFamily: {
      gothic: ["'FK Gothic'", "'Arial Narrow'", 'Arial', 'sans-serif'],
      serif: ["'FK Text'", 'Georgia', "'Times New Roman'", 'serif'],
    },
    // Named for what they set, not for how big they are.
    fontSize: {
      mark: ['0.75rem', '1'],
      scale: ['0.8125rem', '1'],
      label: ['0.875rem', { lineHeight: '1.3', fontWeight: '500' }],
      small: ['0.9375rem', '1.42'],
      body: ['1.0625rem', '1.5'],
      table: ['1.0625rem', '1.3'],
      say: ['1.125rem', '1.45'],
      lead: ['1.1875rem', '1.48'],
      press: ['1.125rem', { lineHeight: '1.1', fontWeight: '600' }],
      section: ['1.25rem', { lineHeight: '1.2', fontWeight: '600' }],
      'section-site': ['1.4375rem', { lineHeight: '1.2', fontWeight: '600' }],
      finding: ['1.5625rem', { lineHeight: '1.15', letterSpacing: '-0.01em', fontWeight: '600' }],
      page: [
        'min(1.875rem, 14vw)',
        { lineHeight: '1.1', letterSpacing: '-0.014em', fontWeight: '600' },
      ],
      'page-desk': [
        '2.375rem',
        { lineHeight: '1.1', letterSpacing: '-0.014em', fontWeight: '600' },
      ],
      opening: ['3.375rem', { lineHeight: '1.04', letterSpacing: '-0.02em', fontWeight: '600' }],
      figure: ['1.375rem', { lineHeight: '1.1', fontWeight: '600' }],
      total: ['1.875rem', { lineHeight: '1', fontWeight: '600' }],
      digit: ['2.25rem', { lineHeight: '1', fontWeight: '500' }],
      halt: [
        'min(16.5vw, 64px)',
        { lineHeight: '0.95', letterSpacing: '-0.01em', fontWeight: '700' },
      ],
      countdown: ['min(25vw, 98px)', { lineHeight: '0.86', fontWeight: '700' }],
      elapsed: [
        'min(38.2vw, 153px)',
        { lineHeight: '0.78', letterSpacing: '-0.012em', fontWeight: '600' },
      ],
    },
    borderRadius: { none: '0', key: '2px' },
    borderWidth: { 0: '0', DEFAULT: '1px', line: '1.5px', bar: '3px', twin: '4px', slip: '6px' },
    boxShadow: { none: 'none' },
    extend: {
      minHeight: {
        row: '44px',
        touch: '48px',
        key: '52px',
        main: '60px',
        pad: '64px',
        cell: '66px',
      },
      maxWidth: { site: '480px', letter: '720px', read: '62ch', form: '788px' },
      screens: { desk: '760px', wide: '1180px' },
      transitionDuration: { roll: '90ms' },
    },
  },
};
