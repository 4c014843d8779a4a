/** Paper or charcoal: the system's setting until the person chooses; the choice is kept per device. */
import { useState } from 'react';

export type Theme = 'system' | 'paper' | 'charcoal';
const PLACE = 'grainward.theme';

function read(): Theme {
  try {
    const kept = localStorage.getItem(PLACE);
    return kept === 'paper' || kept === 'charcoal' ? kept : 'system';
  } catch {
    return 'system';
  }
}

/** Puts the kept choice on the page; called once before the first paint. */
export function applyTheme(theme: Theme = read()): void {
  if (theme === 'system') delete document.documentElement.dataset['theme'];
  else document.documentElement.dataset['theme'] = theme;
}

export function useTheme(): [Theme, (theme: Theme) => void] {
  const [theme, setTheme] = useState<Theme>(read);
  return [
    theme,
    (next) => {
      setTheme(next);
      applyTheme(next);
      try {
        if (next === 'system') localStorage.removeItem(PLACE);
        else localStorage.setItem(PLACE, next);
      } catch {
        return;
      }
    },
  ];
}
