/**
 * Finnish Safety and Chemicals Agency, guidance "Fineness requirements" (read; worked examples WE-119 and WE-120): the
 * mark is the next lower one, never the nearest, and nothing may be under it.
 */
import { expect, it } from 'vitest';
import { checkMarking, chooseMark } from '../../shared/alloy/marking.ts';
import { markingStandard } from '../../shared/alloy/marking-standards.ts';
import { Decimal } from '../../shared/decimal.ts';

const marks = markingStandard('finland', 'gold')?.marks ?? [];

it('the marks for gold are 375, 585, 750, 916, 999', () => {
  expect(marks.map(({ mark }) => mark)).toEqual(['375', '585', '750', '916', '999']);
});

it.each([
  ['WE-119', '588', '585'],
  ['WE-120', '584', '375'],
])('%s: gold found %s is marked %s', (_, found, mark) => {
  expect(chooseMark(new Decimal(found), marks)?.mark).toBe(mark);
});

it('gold of 584 may not bear 585', () => {
  const question = { place: 'finland', metal: 'gold', mark: '585', with_solder: true } as const;
  expect(checkMarking({ ...question, permille: new Decimal('584') })).toMatchObject({
    verdict: 'under',
    reaches: '375',
    sentence:
      '584 gold is 1 under the mark 585, and Finland allows nothing under it. ' +
      'Mark it 375, or bring the fineness up and have it tested again. The assay office decides.',
  });
});
