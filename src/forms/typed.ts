/** From what is typed to the strict form of a body: weights with comma or point and units, figures, empty fields. */
import { printGrams } from '../../shared/mass/micrograms.ts';
import { readTypedMass } from '../../shared/mass/typed-mass.ts';
import { TypedError } from './use-event-form.ts';

/** A weight as grams of six decimals. Throws TypedError beside its field. */
export function typedGrams(text: string, field: string): string {
  const read = readTypedMass(text);
  if (read.ok) return printGrams(read.ug);
  throw new TypedError(field, read.reason);
}

/** A weight that may be left out. */
export const typedGramsOr = (text: string, field: string, otherwise: string): string =>
  text.trim() === '' ? otherwise : typedGrams(text, field);

/** A figure such as a fineness or an amount: comma or point. */
export const typedFigure = (text: string): string => text.trim().replace(/\s/g, '').replace(',', '.');

export const orNull = (text: string): string | null => (text.trim() === '' ? null : text);

export interface TypedWeighing {
  readonly gross: string;
  readonly tare: string;
  readonly stones_ct: string;
}

export const noWeighing: TypedWeighing = { gross: '', tare: '', stones_ct: '' };

/** A weighing of a body; `field` is its path. */
export function typedWeighing(typed: TypedWeighing, field: string) {
  const tared = typed.tare.trim() !== '';
  return {
    gross_g: typedGrams(typed.gross, `${field}.gross_g`),
    tare_g: typedGramsOr(typed.tare, `${field}.tare_g`, '0'),
    tare_kind: tared ? 'measured' : 'none',
    stones_ct: typed.stones_ct.trim() === '' ? '0' : typedFigure(typed.stones_ct),
  };
}
