/** How figures, dates and kinds are written (DESIGN-LOOK sections 3 and 10). Figures stay text; nothing is reckoned here. */
import { printGrams } from '../../shared/mass/micrograms.ts';
import { gramsText } from '../../shared/mass/grams-text.ts';

const THIN = '\u2009';
const MINUS = '\u2212';

/** Sets thousands off by a thin space, and the minus as a minus. */
export function figureText(text: string): string {
  const [whole = '', decimals] = text.replace('-', '').split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, THIN);
  return `${text.startsWith('-') ? MINUS : ''}${grouped}${decimals === undefined ? '' : `.${decimals}`}`;
}

/** Grams of an answer with three decimals: "1 842.316". */
export const gramsFigure = (grams: string, decimals = 3): string =>
  figureText(printGrams(gramsText(grams), decimals));

/** Micrograms with three decimals. */
export const ugFigure = (ug: bigint, decimals = 3): string => figureText(printGrams(ug, decimals));

/** Whether grams of an answer are nothing. */
export const isNothing = (grams: string): boolean => gramsText(grams) === 0n;

/** Money without cents, as in tables: "€ 11 856". */
export function moneyText(amount: string, currency: string, cents = false): string {
  const sign = currency === 'EUR' ? '€' : currency === 'GBP' ? '£' : currency;
  const [whole = '0', decimals = ''] = amount.split('.');
  const shown = cents ? `${whole}.${decimals.padEnd(2, '0').slice(0, 2)}` : whole;
  return `${amount.startsWith('-') ? MINUS : ''}${sign}${THIN}${figureText(shown.replace('-', ''))}`;
}

const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', timeZone: 'UTC' });
const LONG_DAY = new Intl.DateTimeFormat('en-GB', {
  weekday: 'long',
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  timeZone: 'UTC',
});
const TIME = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** "14 May" of a business date. */
export const dayText = (date: string): string => DAY.format(new Date(`${date}T12:00:00Z`));

/** "Thursday 14 May 2026". */
export const longDayText = (date: string): string =>
  LONG_DAY.format(new Date(`${date}T12:00:00Z`)).replace(',', '');

/** "14 May, 10:43" of a moment, in the reader's own zone. */
export const momentText = (iso: string): string =>
  `${DAY.format(new Date(iso))}, ${TIME.format(new Date(iso))}`;

/** "Weigh back" of "weigh_back": a kind in words. */
export function words(kind: string): string {
  const text = kind.replaceAll('_', ' ').replaceAll('-', ' ');
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** "4 812": the number of a voucher. */
export const numberText = (sequence: string): string => figureText(sequence);
