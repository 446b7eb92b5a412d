// The probability of one table given its margins, for engines that do not come across it on their way.
import { DoubleDouble } from '../../numeric/double-double.js';
import { exponentOf, WideSum } from '../../numeric/wide-number.js';
import type { LiveTable } from '../../table/live-table.js';
import { probability } from '../../statistic/probability.js';
import type { Mass } from '../contract.js';

/** Up to this total the factorials are multiplied out. */
const multipliedUpTo = 2 ** 20;

/**
 * (prod R!)(prod C!) / (n! prod n_ij!). Relative error below 2^-70 up to a total of 2^20 (O(total) steps); beyond it that
 * of -ln P, which is absolute: about (cells + -ln P) 2^-48.
 */
export function pointMass(live: LiveTable): Mass {
  if (live.total > multipliedUpTo) {
    const log = -probability.bind(live, { groups: 'rows', event: 0, first: 0 }).value(live.counts);
    return { value: Math.exp(log), log10: log / Math.LN10 };
  }
  // Column by column: the column's arrangements, then those of the rows among what is left - one factor for each unit.
  const product = new DoubleDouble(1);
  let exponent = 0;
  const settle = (): void => {
    if (product.high > 2 ** -300 && product.high < 2 ** 300) return;
    const e = exponentOf(product.high);
    product.set(product.high * 2 ** -e, product.low * 2 ** -e);
    exponent += e;
  };
  const left = Float64Array.from(live.rowTotals);
  let rest = live.total;
  for (let j = 0; j < live.columns; j++) {
    let drawn = 0;
    for (let i = 0; i < live.rows; i++) {
      for (let k = 1; k <= live.counts[i * live.columns + j]!; k++) {
        product.multiply(++drawn).divide(k).multiply(left[i]!--).divide(rest--);
        settle();
      }
    }
  }
  const mass = new WideSum();
  mass.add(product.high, exponent, product.low);
  const whole = new WideSum();
  whole.add(1, 0);
  return mass.over(whole);
}
