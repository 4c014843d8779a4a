/**
 * What a person types or pastes as a weight: comma or point, blanks, a unit behind it. A group of three that could be
 * thousands or decimals is taken as decimals only where it can be nothing else; what is ambiguous is refused, so that
 * 1.234 and 1234 are never confused.
 */
import { Decimal } from '../decimal.ts';
import type { ReadGrams } from './micrograms.ts';
import { MAX_MASS_UG } from './micrograms.ts';
import type { MassUnit } from './units.ts';
import { fromUnit } from './units.ts';

const UNITS: Readonly<Record<string, MassUnit>> = {
  '': 'g',
  g: 'g',
  kg: 'kg',
  ozt: 'ozt',
  dwt: 'dwt',
  gr: 'gr',
  ct: 'ct',
  tola: 'tola',
};

/** Reads a typed weight as micrograms; `unit` is meant where none is typed. Refuses "oz", which may be either ounce. */
export function readTypedMass(text: string, unit: MassUnit = 'g'): ReadGrams {
  const plain = text
    .replace(/[\s\u00A0\u2009\u202F]/g, '')
    .replace(/\u2212/g, '-')
    .toLowerCase();
  if (plain === '') return refuse('Enter the weight.');
  const match = /^(-?)([\d.,]+)([a-z]*)$/.exec(plain);
  if (match === null) return refuse('A weight is a number, such as 12.345. Type it again.');
  const [, sign, figure = '', typedUnit = ''] = match;
  if (sign === '-') return refuse('A weight is not less than nothing. Look at the figure again.');
  if (typedUnit === 'oz')
    return refuse('An ounce may be troy or avoirdupois. Type ozt for troy ounces, or grams.');
  const known = typedUnit === '' ? unit : UNITS[typedUnit];
  if (known === undefined) return refuse(`${typedUnit} is no unit of weight here. Type grams.`);
  const number = readFigure(figure);
  if (number === null)
    return refuse(
      'It is not clear where the decimals begin. Type the weight without marks between thousands.',
    );
  const ug = fromUnit(number, known);
  if (ug > MAX_MASS_UG) return refuse('That is more than a tonne. Look at the unit and the point again.');
  if (known === 'g' && number.decimalPlaces() > 6)
    return refuse('A weight has at most six decimals of a gram.');
  return { ok: true, ug };
}

/** One mark is the decimal mark; two different marks are thousands and decimals; anything else can't be told. */
function readFigure(figure: string): Decimal | null {
  if (/^\d+$/.test(figure)) return new Decimal(figure);
  if (/^\d*[.,]\d+$/.test(figure) || /^\d+[.,]$/.test(figure))
    return new Decimal(figure.replace(',', '.').replace(/\.$/, ''));
  const grouped = /^(\d{1,3})(?:([.,])\d{3})+([.,])\d+$/.exec(figure);
  if (grouped === null || grouped[2] === grouped[3]) return null;
  const [thousands = '', decimal = ''] = [grouped[2], grouped[3]];
  return new Decimal(figure.replaceAll(thousands, '').replace(decimal, '.'));
}

const refuse = (reason: string): ReadGrams => ({ ok: false, reason });
