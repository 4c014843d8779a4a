/** What was typed in a field of figures, set right on leaving it. What can't be read stays as it was typed. */
import { printGrams } from '../../shared/mass/micrograms.ts';
import { readTypedMass } from '../../shared/mass/typed-mass.ts';

/** "38,2 g" as "38.200": as many decimals as the balance reads, more where more were typed. */
export function setMassRight(typed: string): string {
  const read = readTypedMass(typed);
  if (!read.ok) return typed;
  return printGrams(read.ug).replace(/(\.\d{3}\d*?)0+$/, '$1');
}

/** "1 250,50" as "1250.50"; anything that is not one figure stays. */
export function setFigureRight(typed: string): string {
  const plain = typed.replace(/[\s\u00A0\u2009\u202F]/g, '').replace(',', '.');
  return /^-?\d+(\.\d+)?$/.test(plain) ? plain : typed;
}
