/**
 * Rose, The Metallurgy of Gold, p. 432 (read; worked example WE-118): 6.657 oz of gold lost on toughening brittle bars,
 * "0.756 per 1,000". That holds on the gross of the bars; on the gold in them it is 0.826. So a loss names its base.
 */
import { expect, it } from 'vitest';
import { Decimal } from '../../shared/decimal.ts';
import { lossPercent } from '../../shared/loss/allowance.ts';
import { fromUnit } from '../../shared/mass/units.ts';

const ounces = (figure: string | Decimal) => fromUnit(new Decimal(figure), 'ozt');
const lost = '6.657';
const fineBefore = new Decimal('8762').times('0.9189').plus(lost);

it('per thousand of the fine gold it is 0.826', () => {
  expect(lossPercent(ounces(lost), ounces(fineBefore))?.times(10).toFixed(4)).toBe('0.8261');
});

it('per thousand of the gross bars, 2.3 per thousand poorer, it is 0.757', () => {
  expect(
    lossPercent(ounces(lost), ounces(fineBefore.div('0.9166')))
      ?.times(10)
      .toFixed(4),
  ).toBe('0.7572');
});
