/**
 * India: IS 1417:2016 (title and foreword read) and press reports of the grades from 1 January 2017 (read): 22K916,
 * 18K750, 14K585. The later 20K833, 23K958 and 24K995, and that nothing may be under, are from memory.
 */
import { expect, it } from 'vitest';
import { checkMarking, chooseMark } from '../../shared/alloy/marking.ts';
import type { MarkingPlace } from '../../shared/alloy/marking-standards.ts';
import { markingStandard } from '../../shared/alloy/marking-standards.ts';
import { Decimal } from '../../shared/decimal.ts';

const choose = (place: MarkingPlace, found: string) =>
  chooseMark(new Decimal(found), markingStandard(place, 'gold')?.marks ?? [])?.mark;

it('gold is marked by the figure behind the karat', () => {
  expect(choose('india', '916')).toBe('22K916');
  expect(choose('india', '915.9')).toBe('18K750');
  expect(choose('india', '999')).toBe('22K916');
  expect(choose('india_later', '958.4')).toBe('23K958');
  expect(choose('india_later', '995')).toBe('24K995');
});

it('fourteen karat by the 24th part does not reach 14K585', () => {
  const permille = new Decimal(14_000).div(24);
  expect(
    checkMarking({ place: 'india', metal: 'gold', permille, mark: '14K585', with_solder: false }),
  ).toMatchObject({ verdict: 'under', reaches: null });
});
