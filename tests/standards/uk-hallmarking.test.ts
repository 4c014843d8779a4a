/**
 * United Kingdom: standards and exemption weights of the Hallmarking Convention's country profile (read); Hallmarking
 * Act 1973 s. 1(4): false "to any extent or degree (except by understating the fineness)" (read).
 */
import { expect, it } from 'vitest';
import { checkMarking, needsMark } from '../../shared/alloy/marking.ts';
import { markingStandard } from '../../shared/alloy/marking-standards.ts';
import { Decimal } from '../../shared/decimal.ts';
import type { Metal } from '../../shared/mass/vector.ts';

const PROFILE: readonly (readonly [Metal, string, bigint])[] = [
  ['gold', '375 585 750 916 990 999', 1_000_000n],
  ['silver', '800 925 958 999', 7_780_000n],
  ['platinum', '850 900 950 999', 500_000n],
  ['palladium', '500 950 999', 1_000_000n],
];

it.each(PROFILE)('%s is marked %s, and needs no mark under %d µg', (metal, list, least) => {
  const marks = markingStandard('united_kingdom', metal)?.marks ?? [];
  expect(marks.map(({ mark }) => mark).join(' ')).toBe(list);
  expect(needsMark('united_kingdom', metal, least)).toBe(true);
  expect(needsMark('united_kingdom', metal, least - 1n)).toBe(false);
});

it.each([
  ['750', 'meets'],
  ['750.2', 'meets'],
  ['749.9', 'under'],
  ['749.99', 'under'],
] as const)('gold of %s and the mark 750: %s', (found, verdict) => {
  const question = { place: 'united_kingdom', metal: 'gold', mark: '750', with_solder: true } as const;
  expect(checkMarking({ ...question, permille: new Decimal(found) }).verdict).toBe(verdict);
});

it('understating is no fault: gold of 916 may bear 375', () => {
  const question = { place: 'united_kingdom', metal: 'gold', mark: '375', with_solder: false } as const;
  expect(checkMarking({ ...question, permille: new Decimal('916') })).toMatchObject({
    verdict: 'meets',
    reaches: '916',
  });
});

it('fourteen karat by the 24th part is short of 585, and twenty-two is above 916', () => {
  const ask = (permille: Decimal, mark: string) =>
    checkMarking({ place: 'united_kingdom', metal: 'gold', permille, mark, with_solder: false }).verdict;
  expect(ask(new Decimal(14_000).div(24), '585')).toBe('under');
  expect(ask(new Decimal(22_000).div(24), '916')).toBe('meets');
});
