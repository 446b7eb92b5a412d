// The total alone fixed: the exact p against every table of the total, and the bootstrap against the p that it estimates.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { multinomialP } from '../../src/null/unconditional/multinomial-p.js';
import { checked } from '../helpers/checked-result.js';

type Cells = [number, number, number, number];

function* tablesOf(total: number): Generator<Cells> {
  for (let a = 0; a <= total; a++)
    for (let b = 0; a + b <= total; b++) for (let c = 0; a + b + c <= total; c++) yield [a, b, c, total - a - b - c];
}

/** T|T| of the score as a fraction; 0 where a margin is empty. */
function signedSquare([a, b, c, d]: Cells): [bigint, bigint] {
  const cross = BigInt(a) * BigInt(d) - BigInt(b) * BigInt(c);
  const bottom = BigInt(a + b) * BigInt(c + d) * BigInt(a + c) * BigInt(b + d);
  return cross === 0n ? [0n, 1n] : [cross < 0n ? -cross * cross : cross * cross, bottom];
}

const factorial = (n: number): number => (n < 2 ? 1 : n * factorial(n - 1));

/** Probability of the tables at least as extreme, with independent proportions r and c of the first row and column. */
function slowP(observed: Cells, direction: 'upper' | 'lower' | 'distance', r: number, c: number): number {
  const total = observed.reduce((sum, n) => sum + n, 0);
  const value = (cells: Cells): [bigint, bigint] => {
    const [top, bottom] = signedSquare(cells);
    return [direction === 'lower' || (direction === 'distance' && top < 0n) ? -top : top, bottom];
  };
  const target = value(observed);
  let sum = 0;
  for (const cells of tablesOf(total)) {
    const [top, bottom] = value(cells);
    if (top * target[1] < target[0] * bottom) continue;
    const [x, y, z, w] = cells;
    sum +=
      (factorial(total) / (factorial(x) * factorial(y) * factorial(z) * factorial(w))) *
      r ** (x + y) *
      (1 - r) ** (z + w) *
      c ** (x + z) *
      (1 - c) ** (y + w);
  }
  return sum;
}

const cells = fc
  .tuple(fc.nat(4), fc.nat(4), fc.nat(4), fc.nat(4))
  .filter((four) => four.some((n) => n > 0)) as fc.Arbitrary<Cells>;

describe('the exact p of a 2x2 table of fixed total', () => {
  it.each(['upper', 'lower', 'distance'] as const)(
    'bounds every probability, and is met where it says (%s)',
    (direction) => {
      fc.assert(
        fc.property(cells, (observed) => {
          const { p, relativeError, nuisance } = multinomialP(observed, direction);
          expect(relativeError).toBeLessThan(1e-8);
          const here = slowP(observed, direction, ...(nuisance.value as [number, number]));
          expect(here * (1 + relativeError + 1e-12)).toBeGreaterThanOrEqual(p);
          for (let i = 0; i <= 12; i++) {
            for (let j = 0; j <= 12; j++) {
              expect(slowP(observed, direction, i / 12, j / 12)).toBeLessThanOrEqual(p * (1 + 1e-13));
            }
          }
        }),
        { numRuns: 8 },
      );
    },
  );

  it('is the same for either side as groups, in the direction of the same corner', async () => {
    const counts = [
      [9, 3],
      [2, 8],
    ];
    const p = async (groups: 'rows' | 'columns'): Promise<number> =>
      (await analyse({ counts }, { fixed: 'total', statistic: 'score', tail: 'upper', groups })).pValues[0]!.p!;
    expect(await p('columns')).toBeCloseTo(await p('rows'), 12);
  });
});

describe('the parametric bootstrap', () => {
  const counts = [
    [6, 2],
    [3, 7],
  ];

  it('estimates the p at the fitted proportions, and is labelled an approximation', async () => {
    const result = checked(await analyse({ counts }, { fixed: 'total', method: 'sample', draws: 40_000, seed: 'sum' }));
    const [headline, conditional] = result.pValues;
    const error = headline!.errors.find((one) => one.kind === 'sampling')!;
    const truth = slowP([6, 2, 3, 7], 'distance', 8 / 18, 9 / 18);
    expect(Math.abs(error.estimate - truth)).toBeLessThan(4 * error.standardError!);
    expect(headline).toMatchObject({ method: 'sample', guaranteed: false });
    expect(headline!.errors.map(({ kind }) => kind)).toEqual(['sampling', 'approximation']);
    expect(conditional).toMatchObject({ method: 'exact', guaranteed: true });
    expect(result.notes.map(({ code }) => code)).toContain('parametric-bootstrap');
    expect(result.sentence).toContain('parametric-bootstrap p');
  });

  it('gives the same digits for the same seed, and others for another', async () => {
    const p = async (seed: string): Promise<number> =>
      (
        await analyse(
          {
            counts: [
              [3, 1, 4],
              [1, 5, 2],
            ],
          },
          { fixed: 'total', draws: 3000, seed },
        )
      ).pValues[0]!.p!;
    expect(await p('a')).toBe(await p('a'));
    expect(await p('a')).not.toBe(await p('b'));
  });
});
