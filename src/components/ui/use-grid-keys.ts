/**
 * One tab stop for all links and buttons in the rows of a table; then the arrow keys go to the same column of the row
 * above or below, and to the neighbour in the row. Enter opens, as any link does.
 */
import type { KeyboardEvent, RefObject } from 'react';
import { useEffect } from 'react';

const STOPS = 'tbody a, tbody button';

export function useGridKeys(region: RefObject<HTMLElement | null>) {
  // After every drawing: rows come, go and change places.
  useEffect(() => {
    const stops = stopsIn(region.current);
    // A table that is wider than its room can be scrolled by keyboard too; any other is no stop of its own.
    const { scrollWidth, clientWidth } = region.current ?? { scrollWidth: 0, clientWidth: 0 };
    if (scrollWidth > clientWidth) region.current?.setAttribute('tabindex', '0');
    else region.current?.removeAttribute('tabindex');
    const stay = stops.find((stop) => stop === document.activeElement) ?? stops[0];
    stops.forEach((stop) => {
      stop.tabIndex = stop === stay ? 0 : -1;
    });
  });
  return (event: KeyboardEvent<HTMLElement>) => {
    const stops = stopsIn(region.current);
    const at = stops.findIndex((stop) => stop === event.target);
    const from = stops[at];
    if (from === undefined) return;
    const to = next(event.key, stops, from, at);
    if (to === undefined) return;
    event.preventDefault();
    from.tabIndex = -1;
    to.tabIndex = 0;
    to.focus();
  };
}

const stopsIn = (region: HTMLElement | null): HTMLElement[] => [
  ...(region?.querySelectorAll<HTMLElement>(STOPS) ?? []),
];

function next(
  key: string,
  stops: readonly HTMLElement[],
  from: HTMLElement,
  at: number,
): HTMLElement | undefined {
  switch (key) {
    case 'ArrowRight':
      return stops[at + 1];
    case 'ArrowLeft':
      return stops[at - 1];
    case 'ArrowDown':
      return stops.slice(at + 1).find((stop) => isBelow(from, stop));
    case 'ArrowUp':
      return stops.slice(0, at).findLast((stop) => isBelow(from, stop));
    default:
      return undefined;
  }
}

/** Whether another stop stands in another row, in the same column. */
function isBelow(from: HTMLElement, other: HTMLElement): boolean {
  const [cell, otherCell] = [from.closest('th, td'), other.closest('th, td')];
  return (
    cell instanceof HTMLTableCellElement &&
    otherCell instanceof HTMLTableCellElement &&
    cell.parentElement !== otherCell.parentElement &&
    cell.cellIndex === otherCell.cellIndex
  );
}
