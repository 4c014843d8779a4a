/** Single-key shortcuts ("/", "?"), which can be switched off on a device, as some input tools type such keys. */
import { useEffect } from 'react';

const PLACE = 'grainward.shortcuts';

export function shortcutsAreOn(): boolean {
  try {
    return localStorage.getItem(PLACE) !== 'off';
  } catch {
    return true;
  }
}

/** Where the browser keeps nothing, they stay on. */
export function switchShortcuts(on: boolean): void {
  try {
    if (on) localStorage.removeItem(PLACE);
    else localStorage.setItem(PLACE, 'off');
  } catch {
    return;
  }
}

export const isInField = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement && target.matches('input, textarea, select, [contenteditable]');

/** Calls `act` when the key is pressed outside a field. */
export function useShortcut(key: string, act: () => void): void {
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const plain = !event.ctrlKey && !event.metaKey && !event.altKey;
      if (event.key !== key || !plain || isInField(event.target) || !shortcutsAreOn()) return;
      event.preventDefault();
      act();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [key, act]);
}
