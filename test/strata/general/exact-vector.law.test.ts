// Generalised Cochran-Mantel-Haenszel permutation p-values against every set of tables, weighed and compared in fractions.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { factorial, tablesWith, toNumber } from '../../../fixtures/reference/generator/oracle.js';
import { analyse } from '../../../src/analyse.js';
import type { Result } from '../../../src/result/result.js';
import { checked } from '../../helpers/checked-result.js';
import { relativeDifference } from '../../helpers/tables.js';
import { minus, order, over, plus, ratio, solved, times, whole, type Fraction } from './fractions.js';

type Counts = readonly (readonly number[])[];
type Name = 'any-association' | 'mean-scores' | 'score-correlation';

const rowsOf = (table: Counts): number[] => table.map((row) => row.reduce((x, y) => x + y, 0));
const columnsOf = (table: Counts): number[] => table[0]!.map((_, j) => table.reduce((sum, row) => sum + row[j]!, 0));

/** Midrank of each line over the total plus 1; lines without units have one too, which nothing reads. */
function midranks(totals: readonly number[]): Fraction[] {
  const n = totals.reduce((x, y) => x + y, 0);
  return totals.map((total, line) => {
    const before = totals.slice(0, line).reduce((x, y) => x + y, 0);
    return ratio(2 * before + total + 1, 2 * (n + 1));
  });
}

/** The vector of one table: all cells, or sums of column scores by row, or one sum of products. */
function vectorOf(name: Name, table: Counts, u: readonly Fraction[], v: readonly Fraction[]): Fraction[] {
  if (name === 'any-association') return table.flat().map(whole);
  const byRow = table.map((row) => row.reduce((sum: Fraction, n, j) => plus(sum, times(whole(n), v[j]!)), whole(0)));
  if (name === 'mean-scores') return byRow;
  return [byRow.reduce((sum: Fraction, x, i) => plus(sum, times(u[i]!, x)), whole(0))];
}

interface Law {
  readonly vectors: { vector: Fraction[]; weight: bigint }[];
  readonly mean: Fraction[];
  readonly covariance: Fraction[][];
}

/** Law, mean and covariance of one stratum by listing its tables. */
function lawOf(name: Name, table: Counts): Law {
  const [rows, columns] = [rowsOf(table), columnsOf(table)];
  const [u, v] = [midranks(rows), midranks(columns)];
  const vectors = [...tablesWith(rows, columns)].map((flat) => {
    const counts = rows.map((_, i) => flat.slice(i * columns.length, (i + 1) * columns.length));
    const ways = columns.reduce((all, n) => all * factorial(n), 1n) / flat.reduce((all, n) => all * factorial(n), 1n);
    return { vector: vectorOf(name, counts, u, v), weight: ways };
  });
  const all: Fraction = [vectors.reduce((sum, { weight }) => sum + weight, 0n), 1n];
  const mean = vectors[0]!.vector.map((_, i) =>
    over(
      vectors.reduce((sum: Fraction, { vector, weight }) => plus(sum, times(vector[i]!, [weight, 1n])), whole(0)),
      all,
    ),
  );
  const covariance = mean.map((mi, i) =>
    mean.map((mj, j) =>
      over(
        vectors.reduce(
          (sum: Fraction, { vector, weight }) =>
            plus(sum, times(times(minus(vector[i]!, mi), minus(vector[j]!, mj)), [weight, 1n])),
          whole(0),
        ),
        all,
      ),
    ),
  );
  return { vectors, mean, covariance };
}

interface Answer {
  readonly chiSquare: number;
  readonly tails: Record<'upper' | 'lower' | 'both', number>;
}

function oracle(name: Name, strata: readonly Counts[]): Answer {
  const laws = strata.map((one) => lawOf(name, one));
  const d = laws[0]!.mean.length;
  const add = (of: (law: Law) => Fraction): Fraction =>
    laws.reduce((sum: Fraction, law) => plus(sum, of(law)), whole(0));
  const mean = Array.from({ length: d }, (_, i) => add((law) => law.mean[i]!));
  const covariance = Array.from({ length: d }, (_, i) =>
    Array.from({ length: d }, (__, j) => add((law) => law.covariance[i]![j]!)),
  );
  const form = (t: readonly Fraction[]): Fraction => {
    const centred = t.map((x, i) => minus(x, mean[i]!));
    const x = solved(covariance, centred);
    return centred.reduce((sum: Fraction, c, i) => plus(sum, times(c, x[i]!)), whole(0));
  };
  const scoresOf = (one: Counts): [Fraction[], Fraction[]] => [midranks(rowsOf(one)), midranks(columnsOf(one))];
  const observed = strata
    .map((one) => vectorOf(name, one, ...scoresOf(one)))
    .reduce((sum, t) => sum.map((x, i) => plus(x, t[i]!)));
  const target = form(observed);
  const masses = { upper: 0n, lower: 0n, both: 0n };
  let all = 0n;
  const visit = (k: number, t: readonly Fraction[], weight: bigint): void => {
    if (k < laws.length) {
      for (const one of laws[k]!.vectors)
        visit(
          k + 1,
          t.map((x, i) => plus(x, one.vector[i]!)),
          weight * one.weight,
        );
      return;
    }
    all += weight;
    if (order(form(t), target) >= 0) masses.both += weight;
    if (order(t[0]!, observed[0]!) >= 0) masses.upper += weight;
    if (order(t[0]!, observed[0]!) <= 0) masses.lower += weight;
  };
  visit(
    0,
    observed.map(() => whole(0)),
    1n,
  );
  const share = (x: bigint): number => toNumber(x, all);
  return {
    chiSquare: toNumber(...target),
    tails: { upper: share(masses.upper), lower: share(masses.lower), both: share(masses.both) },
  };
}

const cell = fc.integer({ min: 0, max: 2 });
const tablesOf = (rows: number, columns: number): fc.Arbitrary<number[][][]> =>
  fc
    .array(fc.array(fc.array(cell, { minLength: columns, maxLength: columns }), { minLength: rows, maxLength: rows }), {
      minLength: 1,
      maxLength: 2,
    })
    .filter((strata) =>
      strata.every((one) => {
        const [r, c] = [rowsOf(one), columnsOf(one)];
        const total = r.reduce((x, y) => x + y, 0);
        return total > 0 && total <= 9 && r.filter((n) => n > 0).length > 1 && c.filter((n) => n > 0).length > 1;
      }),
    );
const strata = fc.oneof(tablesOf(2, 3), tablesOf(3, 2), tablesOf(3, 3), tablesOf(2, 4));

const run = async (tables: number[][][], statistic: Name): Promise<Result> =>
  checked(await analyse({ strata: tables }, { statistic, method: 'exact' }));

describe.each(['any-association', 'mean-scores', 'score-correlation'] as const)('%s', (statistic) => {
  it('has the value and the p of the fractions, ties decided exactly', async () => {
    await fc.assert(
      fc.asyncProperty(strata, async (tables) => {
        const result = await run(tables, statistic);
        const { chiSquare, tails } = oracle(statistic, tables);
        const [headline, upper, lower] = result.pValues;
        expect(relativeDifference(headline!.p!, tails.both)).toBeLessThan(1e-12);
        if (statistic === 'score-correlation') {
          const root = result.statistic.value as number;
          expect(Math.abs(root * root - chiSquare)).toBeLessThan(1e-10 * Math.max(1, chiSquare));
          expect(relativeDifference(upper!.p!, tails.upper)).toBeLessThan(1e-12);
          expect(relativeDifference(lower!.p!, tails.lower)).toBeLessThan(1e-12);
        } else {
          expect(Math.abs((result.statistic.value as number) - chiSquare)).toBeLessThan(1e-9 * Math.max(1, chiSquare));
        }
      }),
      { numRuns: 120, seed: 41 },
    );
  });
});
