// What the law of S over strata takes, in units of 30 ns, from the margins alone.
import { highestCorner, lowestCorner, type Stratum } from './stratum.js';

/** Values on each side of the mean that a law keeps, in standard deviations. */
const kept = 16;
/** A product carried in double-double, in units of 30 ns. */
const perProduct = 0.4;
/** More values than this are never held. */
const mostValues = 5e7;

export function convolutionWork(strata: readonly Stratum[]): { workUnits: number; tables: number } {
  let units = 0;
  let variance = 0;
  let support = 1;
  let tables = 1;
  for (const stratum of strata) {
    const { first, second, events, others, total } = stratum;
    const values = highestCorner(stratum) - lowestCorner(stratum) + 1;
    const own = ((((first / total) * second) / total) * events * others) / Math.max(1, total - 1);
    const width = Math.min(values, 2 * kept * Math.sqrt(own) + 20);
    const before = Math.min(support, 2 * kept * Math.sqrt(variance) + 20);
    units += 3 * width + before * width * perProduct;
    variance += own;
    support += values - 1;
    tables *= values;
    if (Math.min(support, 2 * kept * Math.sqrt(variance)) > mostValues) return { workUnits: Infinity, tables };
  }
  return { workUnits: units, tables };
}
