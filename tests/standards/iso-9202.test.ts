/**
 * ISO 9202, finenesses of precious-metal alloys: only least values, no minus tolerance (abstract, read). The list is from
 * memory, and only what all editions have is kept.
 */
import { expect, it } from 'vitest';
import { checkMarking } from '../../shared/alloy/marking.ts';
import { markingStandard } from '../../shared/alloy/marking-standards.ts';
import { Decimal } from '../../shared/decimal.ts';
import { METALS } from '../../shared/mass/vector.ts';

it('knows these finenesses', () => {
  const lists = METALS.map((metal) =>
    markingStandard('iso_9202', metal)
      ?.marks.map(({ mark }) => mark)
      .join(' '),
  );
  expect(lists).toEqual(['375 585 750 800 916 990 999', '800 925 999', '850 900 950 999', '500 950 999']);
});

it.each([
  ['585', 'meets'],
  ['584.99', 'under'],
] as const)('its values are the least: %s gold and 585: %s', (found, verdict) => {
  const question = { place: 'iso_9202', metal: 'gold', mark: '585', with_solder: true } as const;
  expect(checkMarking({ ...question, permille: new Decimal(found) }).verdict).toBe(verdict);
});
