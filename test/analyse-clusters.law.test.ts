// Clusters permuted whole: laws, and every way to deal them, one by one.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import type { Cluster, ReadTable } from '../src/input/read-table.js';
import type { PlanOptions } from '../src/plan/plan.js';
import type { Result } from '../src/result/result.js';
import { makeTable } from '../src/table/table.js';
import { problemOfAsync } from './input/text-input.js';
import { checked } from './helpers/checked-result.js';
import { relativeDifference, tableOf, twoByTwoTable } from './helpers/tables.js';

function readOf(clusters: readonly Cluster[], rows: number): ReadTable {
  const counts = Array.from({ length: rows }, (_, i) =>
    clusters[0]!.counts.map((__, j) =>
      clusters.filter(({ row }) => row === i).reduce((sum, one) => sum + one.counts[j]!, 0),
    ),
  );
  return {
    table: makeTable({ counts }),
    clusters,
    source: { form: 'library' },
    sha256: null,
    missing: null,
    notes: [],
  };
}

const run = async (clusters: readonly Cluster[], rows: number, options: PlanOptions): Promise<Result> =>
  checked(await analyse(readOf(clusters, rows), { method: 'exact', ...options }));

const singles = (table: number[][]): Cluster[] =>
  table.flatMap((counts, row) =>
    counts.flatMap((n, column) =>
      Array.from({ length: n }, (_, k) => ({
        label: `${row}.${column}.${k}`,
        row,
        counts: counts.map((__, j) => Number(j === column)),
      })),
    ),
  );

describe('clusters of one unit each', () => {
  it.each(['pearson', 'score', 'wald', 'trend'])('change no p of %s', async (statistic) => {
    const table =
      statistic === 'score' || statistic === 'wald'
        ? twoByTwoTable
        : tableOf({ rows: [2, 3], columns: [2, 3], largest: 3 });
    await fc.assert(
      fc.asyncProperty(table, async (counts) => {
        const alone = await analyse({ counts }, { statistic, method: 'exact' });
        const ours = await run(singles(counts), counts.length, { statistic });
        const exact = (result: Result): number[] =>
          result.pValues.filter(({ method }) => method === 'exact').map(({ p }) => p!);
        const theirs = exact(alone);
        exact(ours).forEach((p, k) => expect(relativeDifference(p, theirs[k]!)).toBeLessThan(1e-12));
        const value = alone.statistic.value as number;
        if (Number.isFinite(value)) expect(ours.statistic.value).toBeCloseTo(value, 9);
        else expect(ours.statistic.value).toBe(value);
      }),
      { numRuns: 40, seed: 61 },
    );
  });
});

/** Every way to give the clusters their rows, as many to a row as it has, with the units that result. */
function* dealt(clusters: readonly Cluster[], rows: number): Generator<number[][]> {
  const left = Array.from({ length: rows }, (_, i) => clusters.filter(({ row }) => row === i).length);
  const counts = left.map(() => clusters[0]!.counts.map(() => 0));
  function* give(k: number): Generator<number[][]> {
    if (k === clusters.length) {
      yield counts.map((row) => [...row]);
      return;
    }
    for (let i = 0; i < rows; i++) {
      if (left[i] === 0) continue;
      left[i]!--;
      clusters[k]!.counts.forEach((n, j) => (counts[i]![j]! += n));
      yield* give(k + 1);
      clusters[k]!.counts.forEach((n, j) => (counts[i]![j]! -= n));
      left[i]!++;
    }
  }
  yield* give(0);
}

/** sum n_ij^2 / (R_i C_j) over one denominator for all tables would be huge; a fraction of big numbers each. */
function pearsonOf(counts: number[][]): [bigint, bigint] {
  const columns = counts[0]!.map((_, j) => counts.reduce((sum, row) => sum + row[j]!, 0));
  let [n, d] = [0n, 1n];
  for (const row of counts) {
    const total = row.reduce((x, y) => x + y, 0);
    row.forEach((x, j) => {
      const below = BigInt(total) * BigInt(columns[j]!);
      if (below > 0n) [n, d] = [n * below + BigInt(x * x) * d, d * below];
    });
  }
  return [n, d];
}

const cluster = fc.record({
  row: fc.integer({ min: 0, max: 1 }),
  counts: fc.tuple(fc.integer({ min: 0, max: 3 }), fc.integer({ min: 0, max: 3 })),
});
const clusters = fc
  .array(cluster, { minLength: 3, maxLength: 8 })
  .map((list) => list.map((one, k): Cluster => ({ label: `${k}`, row: one.row, counts: one.counts })))
  .filter((list) => {
    const columns = [0, 1].map((j) => list.reduce((sum, one) => sum + one.counts[j]!, 0));
    return (
      list.every(({ counts: [a, b] }) => a! + b! > 0) &&
      columns.every((n) => n > 0) &&
      [0, 1].every((row) => list.some((one) => one.row === row))
    );
  });

describe('clusters of any size', () => {
  it('have the p of all ways to deal them, by Pearson', async () => {
    await fc.assert(
      fc.asyncProperty(clusters, async (list) => {
        const [n, d] = pearsonOf(readOf(list, 2).table.counts.map((row) => [...row]));
        let [all, extreme] = [0, 0];
        for (const counts of dealt(list, 2)) {
          const [x, y] = pearsonOf(counts);
          all++;
          if (x * d >= n * y) extreme++;
        }
        expect(relativeDifference((await run(list, 2, {})).pValues[0]!.p!, extreme / all)).toBeLessThan(1e-12);
      }),
      { numRuns: 150, seed: 62 },
    );
  });

  it('have the p of all ways to deal them, in both tails of the trend', async () => {
    await fc.assert(
      fc.asyncProperty(clusters, async (list) => {
        const sum = (counts: readonly (readonly number[])[]): number =>
          counts[0]![0]! + 2 * counts[0]![1]! + 2 * (counts[1]![0]! + 2 * counts[1]![1]!);
        const target = sum(readOf(list, 2).table.counts);
        let [all, above, below] = [0, 0, 0];
        for (const counts of dealt(list, 2)) {
          all++;
          if (sum(counts) >= target) above++;
          if (sum(counts) <= target) below++;
        }
        const { pValues } = await run(list, 2, { statistic: 'trend' });
        const tail = (name: string): number => pValues.find((p) => p.tail === name && p.method === 'exact')!.p!;
        expect(relativeDifference(tail('upper'), above / all)).toBeLessThan(1e-12);
        expect(relativeDifference(tail('lower'), below / all)).toBeLessThan(1e-12);
      }),
      { numRuns: 150, seed: 63 },
    );
  });

  it('are drawn to the same p', async () => {
    const list: Cluster[] = [
      [4, 1],
      [3, 3],
      [5, 0],
      [1, 4],
      [0, 2],
      [2, 3],
      [1, 1],
      [0, 3],
    ].map((counts, k) => ({ label: `${k}`, row: k < 4 ? 0 : 1, counts }));
    const exact = (await run(list, 2, {})).pValues[0]!.p!;
    const drawn = await run(list, 2, { method: 'sample', draws: 10_000, seed: 'c' });
    const [error] = drawn.pValues[0]!.errors;
    expect(drawn.sentence).toContain('10,000 random ways to deal the clusters to the rows');
    const [low, high] = error!.kind === 'sampling' ? error!.interval : [2, 2];
    expect(exact > low && exact < high).toBe(true);
  });
});

describe('what clusters are not for', () => {
  const list: Cluster[] = [
    { label: 'a', row: 0, counts: [2, 1] },
    { label: 'b', row: 1, counts: [1, 2] },
    { label: 'c', row: 1, counts: [0, 2] },
  ];
  it.each([
    [{ statistic: 'likelihood-ratio' }, 'statistic-not-for-clusters'],
    [{ method: 'asymptotic' }, 'no-asymptotic-form'],
    [{ statistic: 'score', twoSidedRule: 'probability' }, 'rule-without-law'],
    [{ statistic: 'score', groups: 'columns' }, 'option-without-effect'],
  ] as [PlanOptions, string][])('%o', async (options, code) => {
    expect((await problemOfAsync(() => analyse(readOf(list, 2), options))).code).toBe(code);
  });
});
