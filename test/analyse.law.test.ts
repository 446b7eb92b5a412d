// Laws that every exact answer keeps, whatever the table: symmetries of the question are symmetries of the p.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { answer } from '../src/analyse.js';
import { exactCuts } from '../src/null/exact/exact-cuts.js';
import type { OrderingName } from '../src/null/contract.js';
import { forecastExact } from '../src/null/forecast.js';
import type { PlanOptions } from '../src/plan/plan.js';
import { statistics } from '../src/statistic/registry.js';
import {
  boundTo,
  liveFrom,
  orderingOf,
  relativeDifference,
  smallTable,
  transpose,
  twoByTwoTable,
} from './helpers/tables.js';

const bound = 1e-12;
const exact = async (counts: number[][], options: PlanOptions = {}): Promise<number[]> => {
  const { pValues } = await answer({ counts }, { ...options, method: 'exact' });
  return pValues.filter((p) => p.method === 'exact').map((p) => p.p!);
};
const expectSame = (ours: number[], theirs: number[]): void => {
  expect(ours).toHaveLength(theirs.length);
  ours.forEach((p, k) => expect(relativeDifference(p, theirs[k]!)).toBeLessThan(bound));
};

const shuffled = <T>(list: readonly T[]): fc.Arbitrary<T[]> =>
  fc.shuffledSubarray([...list], { minLength: list.length, maxLength: list.length });

for (const { name: statistic, shape, sided, takes } of statistics) {
  const ordered = takes?.includes('scores') === true;
  const scoresGroups = takes?.includes('response-scores') === true;
  const table = shape === '2x2' ? twoByTwoTable : smallTable;
  const runs = { numRuns: 150, seed: 11 };

  describe(`laws of ${statistic}`, () => {
    it('p is unchanged by transposing, with the groups carried along', async () => {
      await fc.assert(
        fc.asyncProperty(table, async (counts) => {
          const groups = shape === '2x2' || scoresGroups ? ({ groups: 'columns' } as const) : {};
          expectSame(await exact(transpose(counts), { statistic, ...groups }), await exact(counts, { statistic }));
        }),
        runs,
      );
    });

    if (ordered) {
      ordersMatter(statistic);
    } else if (scoresGroups) {
      if (sided === 'signed') fallsWhereItRose(statistic);
      else groupsChangePlaces(statistic);
    } else if (shape === 'any') {
      it('p is unchanged when rows and columns change places among themselves', async () => {
        const cases = table.chain((counts) =>
          shuffled(counts)
            .chain((rows) => shuffled(transpose(rows)))
            .map((other) => [counts, transpose(other)] as const),
        );
        await fc.assert(
          fc.asyncProperty(cases, async ([counts, other]) => {
            expectSame(await exact(other, { statistic }), await exact(counts, { statistic }));
          }),
          runs,
        );
      });
    } else {
      it('swapping the groups, or the outcomes, exchanges the tails', async () => {
        await fc.assert(
          fc.asyncProperty(twoByTwoTable, async (counts) => {
            const [both, upper, lower] = await exact(counts, { statistic });
            for (const other of [[counts[1]!, counts[0]!], counts.map((row) => [row[1]!, row[0]!])]) {
              expectSame(await exact(other, { statistic }), [both!, lower!, upper!]);
            }
          }),
          runs,
        );
      });
    }

    it('p is unchanged by an added empty row and an added empty column, wherever they stand', async () => {
      await fc.assert(
        fc.asyncProperty(table, fc.nat(), fc.nat(), async (counts, row, column) => {
          const wider = counts.map((line) => line.toSpliced(column % (line.length + 1), 0, 0));
          const larger = wider.toSpliced(
            row % (wider.length + 1),
            0,
            wider[0]!.map(() => 0),
          );
          // Scores are assigned before anything is left out.
          const rowScores = counts.map((_, i) => i).toSpliced(row % (wider.length + 1), 0, 7);
          const columnScores = counts[0]!.map((_, j) => j).toSpliced(column % (counts[0]!.length + 1), 0, -3);
          const plain = { columnScores: counts[0]!.map((_, j) => j) };
          const [scores, before] = ordered
            ? [{ rowScores, columnScores }, {}]
            : scoresGroups
              ? [{ columnScores }, plain]
              : [{}, {}];
          expectSame(await exact(larger, { statistic, ...scores }), await exact(counts, { statistic, ...before }));
        }),
        runs,
      );
    });

    it('a cut sums to 1, and the observed table counts in its own tail', async () => {
      const names: OrderingName[] =
        sided === 'upper'
          ? ['upper', 'lower']
          : ['upper', 'lower', 'distance', ...(scoresGroups ? [] : (['probability'] as const))];
      await fc.assert(
        fc.asyncProperty(table, async (counts) => {
          const live = liveFrom(counts);
          const { engine } = forecastExact(live, boundTo(live, statistic), statistic);
          const { cuts, point } = await exactCuts(
            live,
            names.map((name) => orderingOf(live, statistic, name)),
            engine,
            statistic,
          );
          for (const cut of cuts) {
            if (cut.kind !== 'exact') throw new Error('a small table needs no bracket');
            const { below, tied, above, atLeast } = cut;
            expect(below.value + tied.value + above.value).toBeCloseTo(1, 13);
            expect(tied.value).toBeGreaterThanOrEqual(point.value * (1 - bound));
            expect(atLeast.value).toBeGreaterThanOrEqual(tied.value);
          }
        }),
        runs,
      );
    });
  });
}

/** The groups, or the responses, in reverse order: a rise becomes a fall. */
function fallsWhereItRose(statistic: string): void {
  it('the order of groups, or of responses, reversed exchanges the tails', async () => {
    await fc.assert(
      fc.asyncProperty(smallTable, async (counts) => {
        const [both, upper, lower] = await exact(counts, { statistic });
        for (const other of [counts.toReversed(), counts.map((row) => row.toReversed())]) {
          expectSame(await exact(other, { statistic }), [both!, lower!, upper!]);
        }
      }),
      { numRuns: 150, seed: 14 },
    );
  });
}

function groupsChangePlaces(statistic: string): void {
  it('p is unchanged when groups change places, and when the responses are reversed', async () => {
    const cases = smallTable.chain((counts) => shuffled(counts).map((other) => [counts, other] as const));
    await fc.assert(
      fc.asyncProperty(cases, async ([counts, other]) => {
        const ours = await exact(counts, { statistic });
        expectSame(await exact(other, { statistic }), ours);
        expectSame(
          await exact(
            counts.map((row) => row.toReversed()),
            { statistic },
          ),
          ours,
        );
      }),
      { numRuns: 150, seed: 15 },
    );
  });
}

/** Laws of statistics of ordered lines. */
function ordersMatter(statistic: string): void {
  const runs = { numRuns: 150, seed: 13 };

  it('the order of rows, or of columns, reversed exchanges the tails', async () => {
    await fc.assert(
      fc.asyncProperty(smallTable, async (counts) => {
        const [both, upper, lower] = await exact(counts, { statistic });
        for (const other of [counts.toReversed(), counts.map((row) => row.toReversed())]) {
          expectSame(await exact(other, { statistic }), [both!, lower!, upper!]);
        }
      }),
      runs,
    );
  });

  it('p is unchanged when lines change places together with their scores, and when scores are moved and stretched', async () => {
    const scored = smallTable.chain((counts) =>
      fc
        .tuple(
          fc.array(fc.integer({ min: -3, max: 4 }), { minLength: counts.length, maxLength: counts.length }),
          fc.shuffledSubarray([...counts.keys()], { minLength: counts.length, maxLength: counts.length }),
        )
        .map(([scores, order]) => ({ counts, scores, order })),
    );
    await fc.assert(
      fc.asyncProperty(scored, async ({ counts, scores, order }) => {
        const ours = await exact(counts, { statistic, rowScores: scores });
        const shuffledCounts = order.map((k) => counts[k]!);
        const moved = order.map((k) => Number((scores[k]! * 0.1 + 2.7).toFixed(1)));
        expectSame(await exact(shuffledCounts, { statistic, rowScores: moved }), ours);
      }),
      runs,
    );
  });
}

describe('one tail of a 2x2 table (common practice)', () => {
  it('has the same p for every statistic that rises with the corner count', async () => {
    await fc.assert(
      fc.asyncProperty(twoByTwoTable, async (counts) => {
        expectSame(
          await exact(counts, { statistic: 'wald', tail: 'upper' }),
          await exact(counts, { statistic: 'score', tail: 'upper' }),
        );
      }),
      { numRuns: 150, seed: 12 },
    );
  });

  it('while two-tailed ones may differ, also between the two sides as groups', async () => {
    const counts = [
      [7, 27],
      [1, 33],
    ];
    const [score] = await exact(counts, { statistic: 'score' });
    const lopsided = [
      [3, 1],
      [5, 14],
    ];
    const [rows] = await exact(lopsided, { statistic: 'wald', groups: 'rows' });
    const [columns] = await exact(lopsided, { statistic: 'wald', groups: 'columns' });
    const [other] = await exact(lopsided, { statistic: 'score' });
    expect(new Set([rows, columns, other]).size).toBeGreaterThan(1);
    expect(score).toBeGreaterThan(0);
  });
});
