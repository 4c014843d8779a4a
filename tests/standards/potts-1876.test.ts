/**
 * Potts, Elementary Arithmetic (London, 1876), exercise XIX (read; worked examples WE-020, 022 and 025; where the scan lost
 * the printed answer, the exact one stands). WE-023 compares two rates in money and touches nothing here.
 */
import { expect, it } from 'vitest';
import { fineness, finenessOf, karatToPermille, permilleToKarat } from '../../shared/alloy/fineness.ts';
import { Decimal } from '../../shared/decimal.ts';
import { massFromFineness, splitVector, takeGross } from '../../shared/mass/apportion.ts';
import { fromUnit, toUnit } from '../../shared/mass/units.ts';
import { addMass, sumMass } from '../../shared/mass/vector.ts';

const ofKarat = (ounces: string, karat: string) =>
  massFromFineness(fromUnit(new Decimal(ounces), 'ozt'), fineness({ gold: karatToPermille(karat) }));

it('WE-020, 022: 20 lb troy of 22 karat make 934½ sovereigns of 123.274 gr with 113.0016 gr fine', () => {
  const standardGold = ofKarat('240', '22');
  const coins = splitVector(standardGold, [...Array.from({ length: 934 }, () => 2n), 1n]);
  expect(sumMass(coins)).toEqual(standardGold);
  for (const coin of coins.slice(0, -1)) {
    expect(toUnit(coin.gross, 'gr').toFixed(3)).toBe('123.274');
    expect(toUnit(coin.gold, 'gr').toFixed(3)).toBe('113.002');
  }
  expect(toUnit(standardGold.gold, 'dwt').times(2).div(1869).toFixed(4)).toBe('4.7084');
  expect(toUnit(standardGold.gold, 'gr').times(2).div(1869).toFixed(4)).toBe('113.0016');
});

it('WE-025: 4 oz of 17 karat with 3 oz of 13 are 15 2/7 karat; 3½ oz of it hold 2.229167 oz fine', () => {
  const compound = addMass(ofKarat('4', '17'), ofKarat('3', '13'));
  expect(permilleToKarat(finenessOf(compound)?.gold ?? '0').toFixed(6)).toBe('15.285714');
  const ornament = takeGross(compound, fromUnit(new Decimal('3.5'), 'ozt'));
  expect(toUnit(ornament.gold, 'ozt').toFixed(6)).toBe('2.229167');
});
