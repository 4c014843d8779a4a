/**
 * Karat as 24ths (Hutton 1796, Evans 1888 "22/24 … 916⅔", US Army dental text "carat/24 = fineness/1000"; read), and
 * the usual marks beside them (read or from memory): 14 karat is under its mark of 585, 22 karat above its 916.
 */
import { expect, it } from 'vitest';
import { karatToPermille } from '../../shared/alloy/fineness.ts';

it.each([
  ['8', '333.3333'],
  ['9', '375.0000'],
  ['10', '416.6667'],
  ['12', '500.0000'],
  ['14', '583.3333'],
  ['15', '625.0000'],
  ['16', '666.6667'],
  ['18', '750.0000'],
  ['19', '791.6667'],
  ['20', '833.3333'],
  ['21', '875.0000'],
  ['22', '916.6667'],
  ['23', '958.3333'],
  ['24', '1000.0000'],
])('%s karat is %s per thousand', (karat, permille) => {
  expect(karatToPermille(karat).toFixed(4)).toBe(permille);
  expect(karatToPermille(karat).times(24).toDecimalPlaces(30).toString()).toBe(`${karat}000`);
});

it('14 karat lies under 585, and 22 karat above 916', () => {
  expect(karatToPermille('14').lt(585)).toBe(true);
  expect(karatToPermille('22').gt(916)).toBe(true);
});
