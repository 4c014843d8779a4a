/**
 * Vienna Convention of 1972, Annex I: finenesses and "no negative tolerance" (from memory; a national authority's "lower
 * finenesses than those indicated are not allowed" was read). "There are no weight exemptions" (read).
 */
import { expect, it } from 'vitest';
import { checkMarking, needsMark } from '../../shared/alloy/marking.ts';
import { markingStandard } from '../../shared/alloy/marking-standards.ts';
import { Decimal } from '../../shared/decimal.ts';
import { METALS } from '../../shared/mass/vector.ts';

it('knows these finenesses', () => {
  const lists = METALS.map((metal) =>
    markingStandard('convention', metal)
      ?.marks.map(({ mark }) => mark)
      .join(' '),
  );
  expect(lists).toEqual(['375 585 750 800 916 999', '800 830 925 999', '850 900 950 999', '500 950 999']);
});

it.each(METALS)('%s may not be under its mark, and no weight is exempt', (metal) => {
  const question = { place: 'convention', metal, mark: '999', with_solder: true } as const;
  expect(checkMarking({ ...question, permille: new Decimal('999') }).verdict).toBe('meets');
  expect(checkMarking({ ...question, permille: new Decimal('998.9') }).verdict).toBe('under');
  expect(needsMark('convention', metal, 1n)).toBe(true);
});
