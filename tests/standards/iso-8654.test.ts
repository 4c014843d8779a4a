/**
 * ISO 8654 coloured golds (the table is from memory; that 0N and 1N have 58.5 % gold and 2N to 5N 75 %, and that 5N has
 * the least silver, was read in a secondary text).
 */
import { expect, it } from 'vitest';
import { PUBLISHED_ALLOYS, finenessOfPublished } from '../../shared/alloy/published-alloys.ts';

const colours = PUBLISHED_ALLOYS.filter(({ name }) => /^[0-5]N$/.test(name));

it('0N and 1N have 585 gold, 2N to 5N 750', () => {
  const gold = colours.map(({ name, shares }) => `${name} ${shares.gold?.from.toString() ?? 'none'}`);
  expect(gold).toEqual(['0N 585', '1N 585', '2N 750', '3N 750', '4N 750', '5N 750']);
});

it('5N has the least silver of them, and less silver is redder from 2N on', () => {
  const silver = colours.slice(2).map(({ shares }) => shares.silver);
  silver.slice(1).forEach((less, index) => {
    expect(silver[index]?.from.gt(less?.to ?? 1000)).toBe(true);
  });
});

it('they are ranges: no single fineness is made up for them, and each says that it is from memory', () => {
  for (const alloy of colours) {
    expect(finenessOfPublished(alloy)).toBeNull();
    expect(alloy.source.certainty).toBe('from memory');
  }
});
