// The exact null of an r x c table for statistics that are sums over cells: the cut, to twelve digits at any magnitude of
// p, every tie decided.
import type { LiveTable } from '../../../table/live-table.js';
import type { ExactCut, Ordering } from '../../contract.js';
import { cutFrom } from '../exact-answer.js';
import { sumMasses, type NetworkOptions } from './masses.js';

/**
 * Masses below, level with and above the observed table. The ordering must be that of a sum over cells; `statistic` names
 * the statistic it came from (exact keys for products of n! or n^n).
 * @throws OutOfReach when more than `entryLimit` partial sums would have to be held, or the meter's bound is passed.
 */
export function exactCut(
  live: LiveTable,
  ordering: Ordering,
  statistic: string,
  options: NetworkOptions = {},
): ExactCut {
  if (ordering.sum === undefined) throw new Error('the ordering is not that of a sum over cells');
  const { cells, direction } = ordering.sum;
  const { below, tied, above, whole, error } = sumMasses(live, cells, statistic, options);
  const [less, more] = direction > 0 ? [below, above] : [above, below];
  return cutFrom(ordering.name, { below: less, tied, above: more, whole }, error);
}
