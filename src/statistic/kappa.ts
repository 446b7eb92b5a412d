// Cohen's kappa, plain and weighted: how far two raters agree beyond what their own habits would bring about (Cohen 1960, 1968). With
// both margins held it is an increasing linear function of a sum of whole agreement weights over the cells.
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, Place, Statistic } from './contract.js';
import { sumOverCells } from './expected.js';
import { agreementOf, kappaMoments, type KappaWeights } from './kappa-moments.js';
import { pairedNamed } from './paired.js';
import { trend } from './trend.js';

/** @param levels of the whole square table, empty ones too: they set the distance that counts as the largest. */
export function kappaStatistic(name: string, levels: number): Statistic {
  const { words, formula, source } = pairedNamed(name);
  const weights = weightsOf(name);
  return {
    name,
    sided: 'upper',
    shape: 'any',
    words,
    formula,
    range: 'at most 1 (full agreement); 0: as much as by chance',
    source,
    limit: 'normal',
    bind: (live) => bind(live, name, weights, levels),
  };
}

export const weightsOf = (name: string): KappaWeights =>
  name === 'kappa-linear' ? 'linear' : name === 'kappa-quadratic' ? 'quadratic' : 'none';

function bind(live: LiveTable, name: string, weights: KappaWeights, levels: number): BoundStatistic {
  const agreement = agreementOf(weights, levels);
  const moments = (counts: ArrayLike<number>): ReturnType<typeof kappaMoments> => kappaMoments(live, agreement, counts);
  const { kappa, nullError } = moments(live.counts);
  return {
    ...sumOf(live, weights, levels),
    value: (counts) => moments(counts).kappa,
    standardised: nullError > 0 ? [{ name, value: kappa / nullError }] : [],
  };
}

/** Quadratic weights: sum (i - j)^2 n is, with the margins held, a constant less twice the sum of i j n, which has engines of its own. */
function sumOf(live: LiveTable, weights: KappaWeights, levels: number): Partial<BoundStatistic> {
  if (weights === 'quadratic') {
    const scores = (index: readonly number[]) => index.map((k) => ({ numerator: BigInt(k), denominator: 1n }));
    const bound = trend.bind(
      live,
      { groups: 'rows', event: 0, first: 0 },
      { rowScores: scores(live.rowIndex), columnScores: scores(live.columnIndex) },
    );
    const { sum, linear, corner, place } = bound;
    return {
      ...(sum === undefined ? {} : { sum }),
      ...(linear === undefined ? {} : { linear }),
      ...(corner === undefined ? {} : { corner }),
      ...(place === undefined ? {} : { place }),
    };
  }
  const weight = (row: number, column: number): number => {
    const apart = Math.abs(live.rowIndex[row]! - live.columnIndex[column]!);
    return weights === 'linear' ? levels - 1 - apart : apart === 0 ? 1 : 0;
  };
  const cell = (row: number, column: number, count: number): number => weight(row, column) * count;
  const observed = sumOverCells(live, live.counts, cell);
  const decide = (counts: ArrayLike<number>): Place => Math.sign(sumOverCells(live, counts, cell) - observed) as Place;
  return { sum: { cell, observed, slack: 0, decide } };
}
