// The ordinal measures against their definitions: pairs counted one by one, standard errors by the delta method with
// slopes taken numerically. The table of job satisfaction (Agresti 2002, p. 57, from memory) has gamma 0.221, standard error 0.117.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ordinalMeasures } from '../../src/order/measures.js';
import { makeTable } from '../../src/table/table.js';
import { tableOf, transpose } from '../helpers/tables.js';

const addUp = (numbers: readonly number[]): number => numbers.reduce((a, b) => a + b, 0);

/** All five, of weights that need not be whole. */
function plainly(weights: number[][]): number[] {
  let [concordant, discordant] = [0, 0];
  weights.forEach((row, i) =>
    row.forEach((w, j) =>
      weights.slice(i + 1).forEach((other) =>
        other.forEach((v, k) => {
          if (k > j) concordant += w * v;
          if (k < j) discordant += w * v;
        }),
      ),
    ),
  );
  const rows = weights.map(addUp);
  const columns = transpose(weights).map(addUp);
  const all = addUp(rows);
  const differing = (totals: number[]): number => all * all - addUp(totals.map((x) => x * x));
  const levels = Math.min(rows.length, columns.length);
  const difference = concordant - discordant;
  return [
    difference / (concordant + discordant),
    (2 * difference) / Math.sqrt(differing(rows) * differing(columns)),
    (2 * levels * difference) / (all * all * (levels - 1)),
    (2 * difference) / differing(rows),
    (2 * difference) / differing(columns),
  ];
}

/** sqrt((sum p f'^2 - (sum p f')^2) / n), f' by central differences. */
function errorsNumerically(counts: number[][]): number[] {
  const total = addUp(counts.flat());
  const shares = counts.map((row) => row.map((count) => count / total));
  const step = 1e-6;
  const slopes = counts.map((row, i) =>
    row.map((_, j) => {
      const moved = (by: number): number[] =>
        plainly(shares.map((line, a) => line.map((p, b) => (a === i && b === j ? p + by : p))));
      const [up, down] = [moved(step), moved(-step)];
      return up.map((value, k) => (value - down[k]!) / (2 * step));
    }),
  );
  return [0, 1, 2, 3, 4].map((k) => {
    const mean = addUp(shares.flatMap((row, i) => row.map((p, j) => p * slopes[i]![j]![k]!)));
    const square = addUp(shares.flatMap((row, i) => row.map((p, j) => p * slopes[i]![j]![k]! ** 2)));
    return Math.sqrt(Math.max(0, square - mean * mean) / total);
  });
}

const tables = tableOf({ rows: [2, 4], columns: [2, 4], largest: 9 });

describe('the ordinal measures', () => {
  it('are those of their definitions', () => {
    fc.assert(
      fc.property(tables, (counts) => {
        const ours = ordinalMeasures(makeTable({ counts }));
        plainly(counts).forEach((value, k) => {
          if (Number.isNaN(value)) expect(ours[k]!.estimate).toBeNull();
          else expect(ours[k]!.estimate).toBeCloseTo(value, 12);
        });
      }),
      { numRuns: 300 },
    );
  });

  it('have the standard errors of the delta method', () => {
    fc.assert(
      fc.property(tables, (counts) => {
        const ours = ordinalMeasures(makeTable({ counts }));
        errorsNumerically(counts).forEach((error, k) => {
          if (ours[k]!.standardError !== null) expect(Math.abs(ours[k]!.standardError - error)).toBeLessThan(1e-6);
        });
      }),
      { numRuns: 200 },
    );
  });

  it('agree with a published table', () => {
    const job = makeTable({ counts: [[1, 3, 10, 6], [2, 3, 10, 7], [1, 6, 14, 12], [0, 1, 9, 11]] }); // prettier-ignore
    const [gamma] = ordinalMeasures(job);
    expect(gamma!.estimate).toBeCloseTo(0.221, 3);
    expect(gamma!.standardError).toBeCloseTo(0.117, 3);
  });

  it('change sign when one side is reversed, and keep their value when both sides change places', () => {
    fc.assert(
      fc.property(tables, (counts) => {
        const ours = ordinalMeasures(makeTable({ counts }));
        const reversed = ordinalMeasures(makeTable({ counts: counts.toReversed() }));
        const turned = ordinalMeasures(makeTable({ counts: transpose(counts) }));
        ours.forEach(({ estimate, standardError }, k) => {
          if (estimate === null) return;
          expect(reversed[k]!.estimate).toBeCloseTo(-estimate, 12);
          expect(reversed[k]!.standardError).toBeCloseTo(standardError!, 9);
          const other = k < 3 ? k : 7 - k;
          expect(turned[other]!.estimate).toBeCloseTo(estimate, 12);
          expect(turned[other]!.standardError).toBeCloseTo(standardError!, 9);
        });
      }),
      { numRuns: 200 },
    );
  });

  it('have no value where all units share a level', () => {
    for (const { estimate } of ordinalMeasures(makeTable({ counts: [[3, 0], [4, 0]] })).slice(0, 3)) expect(estimate).toBeNull(); // prettier-ignore
  });
});
