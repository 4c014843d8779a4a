/**
 * What a person types or pastes as a weight: comma or point, blanks between thousands, a unit behind it. A point alone
 * is the decimal mark. A comma before exactly three figures could be either ("1,234"), and is refused, so that 1.234
 * and 1234 are never confused; so are units that mean two things.
 */
import { Decimal } from '../decimal.ts';
import type { ReadGrams } from './micrograms.ts';
import { MAX_MASS_UG } from './micrograms.ts';
import type { MassUnit } from './units.ts';
import { fromUnit } from './units.ts';

const TYPED_UNITS: ReadonlyMap<string, MassUnit> = new Map([
  ['g', 'g'],
  ['kg', 'kg'],
  ['ozt', 'ozt'],
  ['ozav', 'ozav'],
  ['dwt', 'dwt'],
  ['grain', 'gr'],
  ['grains', 'gr'],
  ['ct', 'ct'],
  ['tola', 'tola'],
  ['momme', 'momme'],
]);

/** Units that mean two things. Each is taken only in a field whose own unit it is. */
const UNCLEAR_UNITS: ReadonlyMap<string, string> = new Map([
  ['oz', 'An ounce may be troy or avoirdupois. Type ozt for troy ounces, or grams.'],
  ['gr', 'gr may be grains or grams. Type g for grams, or grains.'],
  ['tael', 'A tael may be the statutory one or the trade’s. Type grams.'],
  ['baht', 'A baht of bar and of ornaments weigh differently. Type grams.'],
]);

/** More than any weight has; what is longer is a slip of the clipboard. */
const MOST_CHARACTERS = 40;

/**
 * Reads a typed weight as micrograms; `unit` is meant where none is typed. A figure in another unit than grams is
 * rounded once, half to even. Refuses with a sentence: nothing typed, less than nothing, a figure that could be read
 * in two ways, an unknown or unclear unit, more than six decimals of a gram, more than a tonne.
 */
export function readTypedMass(text: string, unit: MassUnit = 'g'): ReadGrams {
  const plain = text.trim().replace(/\s/g, ' ').replace('\u2212', '-').toLowerCase();
  if (plain === '') return refuse('Enter the weight.');
  const match = plain.length > MOST_CHARACTERS ? null : /^(-?) ?([.,]?\d[\d., ]*)([a-z]*)$/.exec(plain);
  if (match === null) return refuse('A weight is a number, such as 12.345. Type it again.');
  const [, sign, typedFigure = '', typedUnit = ''] = match;
  if (sign === '-') return refuse('A weight is not less than nothing. Look at the figure again.');
  const known = typedUnit === '' || typedUnit === unit ? unit : TYPED_UNITS.get(typedUnit);
  if (known === undefined)
    return refuse(UNCLEAR_UNITS.get(typedUnit) ?? `${typedUnit} is no unit of weight here. Type grams.`);
  const figure = typedFigure.trim();
  const plainFigure = decimalFigure(figure);
  if (plainFigure === null) return refuse(unclear(figure));
  const value = new Decimal(plainFigure);
  const ug = fromUnit(value, known);
  if (ug > MAX_MASS_UG) return refuse('That is more than a tonne. Look at the unit and the point again.');
  if (known === 'g' && value.decimalPlaces() > 6)
    return refuse('A weight has at most six decimals of a gram. Leave the others away.');
  return { ok: true, ug };
}

/** The figure with a point and without thousands, or null where it could be read in two ways or in none. */
function decimalFigure(figure: string): string | null {
  if (isCommaOrThousands(figure)) return null;
  if (/^(\d+[.,]?|\d*[.,]\d+)$/.test(figure)) return figure.replace(',', '.').replace(/\.$/, '');
  if (/^[1-9]\d{0,2}( \d{3})+([.,]\d+)?$/.test(figure)) return figure.replaceAll(' ', '').replace(',', '.');
  if (/^[1-9]\d{0,2}(,\d{3})+\.\d+$/.test(figure)) return figure.replaceAll(',', '');
  if (/^[1-9]\d{0,2}(\.\d{3})+,\d+$/.test(figure)) return figure.replaceAll('.', '').replace(',', '.');
  return null;
}

/** "1,234": 1.234 to one reader, 1234 to another. "0,234" and "1234,567" can only be decimals. */
const isCommaOrThousands = (figure: string): boolean => /^[1-9]\d{0,2},\d{3}$/.test(figure);

function unclear(figure: string): string {
  if (!isCommaOrThousands(figure))
    return 'It is not clear where the decimals begin. Type the weight without marks between thousands.';
  return `${figure} may be ${figure.replace(',', '.')} or ${figure.replace(',', '')}. Type the one that is meant.`;
}

const refuse = (reason: string): ReadGrams => ({ ok: false, reason });
