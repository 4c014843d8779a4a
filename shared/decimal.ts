/** The one place that configures decimal.js: 40 figures, half to even, never an exponent in what is printed. */
import { Decimal as DecimalJs } from 'decimal.js';

export const Decimal = DecimalJs.clone({
  precision: 40,
  rounding: DecimalJs.ROUND_HALF_EVEN,
  toExpNeg: -40,
  toExpPos: 40,
});
export type Decimal = DecimalJs;
