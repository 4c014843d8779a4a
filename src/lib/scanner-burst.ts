/**
 * A barcode scanner is a very fast keyboard that ends with Enter. Its burst is taken as a code wherever the focus is,
 * unless a field has it: nobody types this fast.
 */
import { useEffect } from 'react';
import { isInField } from './shortcuts.ts';

const FASTEST_HAND_MS = 45;
const SHORTEST_CODE = 6;

/** Calls `onCode` with what a scanner sent. */
export function useScannerBurst(onCode: (code: string) => void): void {
  useEffect(() => {
    let burst = '';
    let last = 0;
    const onKey = (event: KeyboardEvent) => {
      if (isInField(event.target)) return;
      if (event.timeStamp - last > FASTEST_HAND_MS) burst = '';
      last = event.timeStamp;
      if (event.key.length === 1) burst += event.key;
      if (event.key !== 'Enter' || burst.length < SHORTEST_CODE) return;
      event.preventDefault();
      event.stopPropagation();
      onCode(burst);
      burst = '';
    };
    window.addEventListener('keydown', onKey, { capture: true });
    return () => window.removeEventListener('keydown', onKey, { capture: true });
  }, [onCode]);
}
