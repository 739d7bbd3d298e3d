import { useState } from 'react';

type Theme = 'day' | 'night';

function shownTheme(): Theme {
  return document.documentElement.dataset.theme === 'night' ? 'night' : 'day';
}

function keepTheme(theme: Theme) {
  document.documentElement.dataset.theme = theme;
  try {
    localStorage.setItem('fusekeeper-theme', theme);
  } catch {
    // Storage can be closed to a page; the choice then lasts as long as the page.
  }
  window.dispatchEvent(new Event('fusekeeper-theme'));
}

/** The word at the top right of every screen: what a press turns it to. */
export function ThemeWord({ className = '' }: { className?: string }) {
  const [theme, setTheme] = useState(shownTheme);
  const other: Theme = theme === 'day' ? 'night' : 'day';
  const handleClick = () => {
    keepTheme(other);
    setTheme(other);
  };
  return (
    <button
      type="button"
      className={`word min-w-12 justify-center ${className}`}
      onClick={handleClick}
    >
      {other === 'night' ? 'Night' : 'Day'}
    </button>
  );
}
