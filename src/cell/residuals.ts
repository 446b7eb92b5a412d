// What each cell adds to the statistic, and how far it lies from expectation.
import { toDouble, decimalRational, fractionRational } from '../numeric/rational.js';
import { expectedCount, type LiveTable } from '../table/live-table.js';

export interface CellMeasures {
  /** e = R C / n. */
  readonly expected: number;
  readonly contribution: number;
  /** (n - e) / sqrt e. */
  readonly pearsonResidual: number;
  /** (n - e) / sqrt(e (1 - R/n) (1 - C/n)): near standard normal for large counts (Haberman 1973); null where R or C is n. */
  readonly adjustedResidual: number | null;
}

/** The family member that a statistic is (Cressie & Read 1984), as its exponent; undefined for those that are no sum over cells. */
export function familyExponent(statistic: string, lambda: string | undefined): number | undefined {
  if (statistic === 'pearson') return 1;
  if (statistic === 'likelihood-ratio') return 0;
  if (statistic === 'freeman-tukey') return -1 / 2;
  if (statistic !== 'power-divergence' || lambda === undefined) return undefined;
  const exact = decimalRational(lambda) ?? fractionRational(lambda);
  return exact === undefined ? undefined : toDouble(exact);
}

/**
 * @param exponent of the power-divergence family; contributions add up to that statistic and none is negative: (n - e)^2 / e for 1,
 * 2 (n ln(n/e) - (n - e)), the square of the deviance residual (McCullagh & Nelder 1989), for 0.
 */
export function cellMeasures(live: LiveTable, cell: number, exponent: number): CellMeasures {
  const row = Math.floor(cell / live.columns);
  const column = cell % live.columns;
  const { total } = live;
  const [rowTotal, columnTotal, count] = [live.rowTotals[row]!, live.columnTotals[column]!, live.counts[cell]!];
  const expected = expectedCount(live, row, column);
  // The difference from n N - R C in whole numbers: n - e alone would lose the digits of a small one.
  const apart = Number(BigInt(count) * BigInt(total) - BigInt(rowTotal) * BigInt(columnTotal)) / total;
  const free = ((total - rowTotal) / total) * ((total - columnTotal) / total);
  return {
    expected,
    contribution: exponent === 1 ? (apart * apart) / expected : contributionOf(count, expected, apart, exponent),
    pearsonResidual: apart / Math.sqrt(expected),
    adjustedResidual: free === 0 ? null : apart / Math.sqrt(expected * free),
  };
}

function contributionOf(count: number, expected: number, apart: number, exponent: number): number {
  const factor = 2 / (exponent + 1);
  if (count === 0) return factor * expected;
  const logRatio = Math.log1p(apart / expected);
  const grown = exponent === 0 ? count * logRatio : (count * Math.expm1(exponent * logRatio)) / exponent;
  return Math.max(0, factor * (grown - apart));
}
