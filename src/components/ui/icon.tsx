/**
 * The marks of the sprite, always beside a word. The sprite and the drawn grounds are put into the page once, by
 * `IconSprite`.
 */
import sprite from '../../assets/icons.svg?raw';
import { Patterns } from './patterns.tsx';

export const ICONS = [
  'safe',
  'bench',
  'station',
  'bin',
  'courier',
  'refiner',
  'grain',
  'bar',
  'sheet',
  'wire',
  'scrap',
  'filings',
  'sweeps',
  'melt',
  'work',
  'balance',
  'in',
  'out',
  'back',
  'check',
  'ok',
  'wait',
  'near',
  'bad',
  'hold',
  'info',
  'print',
  'search',
  'user',
  'cal',
  'seal',
  'sign',
  'scan',
  'plus',
  'next',
  'down',
  'save',
  'undo',
  'offline',
  'dark',
  'book',
] as const;
export type IconName = (typeof ICONS)[number];

export function IconSprite() {
  return (
    <>
      <div hidden dangerouslySetInnerHTML={{ __html: sprite }} />
      <Patterns />
    </>
  );
}

export function Icon({ name, size = 18 }: { readonly name: IconName; readonly size?: number }) {
  return (
    <svg className="icon" width={size} height={size} aria-hidden="true">
      <use href={`#${name}`} />
    </svg>
  );
}
