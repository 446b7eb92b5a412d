// Statistics of the units as functions of the table of groups by kinds of cluster, compared exactly.
import { lowest, type Rational } from '../../numeric/rational.js';
import type { BoundStatistic, Choices, Place, Roles, Statistic } from '../../statistic/contract.js';
import { statisticNamed } from '../../statistic/registry.js';
import { trend } from '../../statistic/trend.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Kinds } from './kinds.js';
import {
  compare,
  pearsonFraction,
  pearsonValue,
  sharesOf,
  signOf,
  squareOf,
  type Fraction,
  type Units,
} from './unit-counts.js';

/** Those that are worked out for clusters. */
export const clusterStatistics = ['pearson', 'wald', 'score', 'trend'] as const;
export type ClusterStatistic = (typeof clusterStatistics)[number];

/**
 * @param units the live table of units: its columns, and roles and scores refer to its lines
 * @param live the live table of groups by kinds; its rows are those of `units`
 */
export function bindToClusters(
  name: ClusterStatistic,
  units: LiveTable,
  live: LiveTable,
  kinds: Kinds,
  roles: Roles,
  choices: Choices,
): BoundStatistic {
  const perKind = live.columnIndex.map((kind) => units.columnIndex.map((column) => kinds.counts[kind]![column]!));
  if (name === 'trend')
    return trend.bind(live, roles, { ...choices, columnScores: kindScores(perKind, choices.columnScores!) });
  const read = unitsReader(units, live, perKind);
  if (name === 'pearson') {
    const target = pearsonFraction(read(live.counts));
    return {
      value: (counts) => pearsonValue(read(counts)),
      place: (counts) => compare(pearsonFraction(read(counts)), target),
    };
  }
  const pooled = name === 'score';
  const sizeOf = (counts: ArrayLike<number>): { sign: Place; square: Fraction } => {
    const shares = sharesOf(read(counts), roles);
    return { sign: signOf(shares), square: squareOf(shares, pooled) };
  };
  const target = sizeOf(live.counts);
  return {
    value(counts) {
      const { sign, square } = sizeOf(counts);
      return sign === 0 ? 0 : square[1] === 0n ? sign * Infinity : sign * Math.sqrt(quotient(square));
    },
    place(counts) {
      const { sign, square } = sizeOf(counts);
      if (sign !== target.sign) return sign > target.sign ? 1 : -1;
      const further = compare(square, target.square);
      return sign === 0 ? 0 : further === 0 ? 0 : ((further * sign) as Place);
    },
    distance: (counts) => compare(sizeOf(counts).square, target.square),
  };
}

/** The statistic as the plan and the engines know it: no law of its own, since clusters are not independent units. */
export const clusterForm = (name: ClusterStatistic): Statistic => ({
  ...statisticNamed(name),
  limit: name === 'trend' ? 'normal' : 'none',
});

/** Score of a kind: the scores of its units added up. */
function kindScores(perKind: readonly (readonly number[])[], scores: readonly Rational[]): Rational[] {
  return perKind.map((counts) =>
    counts.reduce(
      (sum: Rational, count, j) => {
        const { numerator, denominator } = scores[j]!;
        return lowest(
          sum.numerator * denominator + BigInt(count) * numerator * sum.denominator,
          sum.denominator * denominator,
        );
      },
      { numerator: 0n, denominator: 1n },
    ),
  );
}

/** Reuses one buffer: the units of a table are read before the next one is. */
function unitsReader(units: LiveTable, live: LiveTable, perKind: readonly (readonly number[])[]) {
  const { rows, columns, columnTotals, total } = units;
  const found = {
    rows,
    columns,
    columnTotals,
    total,
    counts: new Float64Array(rows * columns),
    rowTotals: new Float64Array(rows),
  };
  return (table: ArrayLike<number>): Units => {
    found.counts.fill(0);
    found.rowTotals.fill(0);
    for (let i = 0; i < rows; i++) {
      for (let k = 0; k < live.columns; k++) {
        const clusters = table[i * live.columns + k]!;
        if (clusters === 0) continue;
        for (let j = 0; j < columns; j++) {
          const count = clusters * perKind[k]![j]!;
          found.counts[i * columns + j]! += count;
          found.rowTotals[i]! += count;
        }
      }
    }
    return found;
  };
}

/** The nearest double but a bit of a fraction of whole numbers of any size. */
function quotient([above, below]: Fraction): number {
  const shift = BigInt(Math.max(0, below.toString(2).length - above.toString(2).length + 64));
  return Number((above << shift) / below) * 2 ** -Number(shift);
}
