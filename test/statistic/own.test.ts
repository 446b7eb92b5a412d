// A statistic of the user's own, passed in by a program: exact, sampled, and refused where it misbehaves.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import type { Problem } from '../../src/problem/problem.js';
import type { OwnStatistic } from '../../src/statistic/own.js';
import { checked } from '../helpers/checked-result.js';
import { relativeDifference } from '../helpers/tables.js';

const counts = [
  [3, 0, 2],
  [1, 4, 0],
  [2, 2, 3],
];
const twoByTwo = [
  [8, 2],
  [1, 9],
];
const enormous = Array.from({ length: 8 }, () => Array.from({ length: 8 }, () => 20));

/** Pearson's statistic, written as a user would. */
const mine: OwnStatistic = {
  name: 'my-pearson',
  sided: 'upper',
  words: 'chi-square by hand',
  value: (table, { rows, columns, rowTotals, columnTotals, total }) => {
    let sum = 0;
    for (let i = 0; i < rows; i++) {
      for (let j = 0; j < columns; j++)
        sum += table[i * columns + j]! ** 2 * (total / rowTotals[i]! / columnTotals[j]!);
    }
    return sum;
  },
};
const corner: OwnStatistic = {
  name: 'corner',
  sided: 'signed',
  words: 'the first cell',
  centre: 4.5,
  value: (t) => t[0]!,
};

const refusal = async (statistic: unknown, options: object = {}): Promise<Problem> => {
  try {
    await analyse({ counts }, { statistic: statistic as OwnStatistic, ...options });
  } catch (thrown) {
    return thrown as Problem;
  }
  throw new Error('was not refused');
};

describe('a statistic of one’s own', () => {
  it('has the exact p of its built-in twin, by listing the tables, and is said to be compared in doubles', async () => {
    const ours = checked(await analyse({ counts }, { statistic: mine }));
    const theirs = await analyse({ counts }, { statistic: 'pearson' });
    expect(relativeDifference(ours.pValues[0]!.p!, theirs.pValues[0]!.p!)).toBeLessThan(1e-12);
    expect(ours.pValues).toHaveLength(1);
    expect(ours.statistic.name).toBe('my-pearson');
    expect(ours.notes.find(({ code }) => code === 'own-statistic')!.text).toContain('chi-square by hand');
    expect(ours.notes.map(({ code }) => code)).not.toContain('asymptotic-undefined');
  });

  it('with a sign has both tails: those of the corner of a 2x2 table', async () => {
    const ours = checked(await analyse({ counts: twoByTwo }, { statistic: corner }));
    const theirs = await analyse({ counts: twoByTwo }, { statistic: 'score' });
    for (const k of [0, 1, 2])
      expect(relativeDifference(ours.pValues[k]!.p!, theirs.pValues[k]!.p!)).toBeLessThan(1e-12);
  });

  it('may go up and down with the corner of a 2x2 table', async () => {
    const parity: OwnStatistic = { ...corner, name: 'parity', sided: 'upper', value: (t) => t[0]! % 2 };
    const result = await analyse({ counts: twoByTwo }, { statistic: parity });
    // 8 is even: every table is at least as extreme, and the odd ones more so.
    const { p, strict } = result.pValues[0]!;
    expect(p).toBe(1);
    expect(strict!).toBeGreaterThan(0.3);
  });

  it('is sampled where tables are many, with the same draws as a built-in one', async () => {
    const options = { seed: 'own', draws: 2000 };
    const table = { counts: enormous.map((row, i) => row.map((n, j) => (i === j ? n + 9 : n))) };
    const ours = checked(await analyse(table, { statistic: mine, ...options }));
    const theirs = await analyse(table, { statistic: 'pearson', ...options, method: 'sample' });
    expect(ours.plan.method).toBe('sample');
    expect(ours.pValues[0]!.p).toBe(theirs.pValues[0]!.p);
  });

  it('may be infinite', async () => {
    const infinite: OwnStatistic = { ...mine, name: 'infinite', value: (t) => (t[0] === 3 ? Infinity : 0) };
    const { pValues, statistic } = checked(await analyse({ counts }, { statistic: infinite }));
    expect(statistic.value).toBe('infinity');
    expect(pValues[0]!.tied).toBeGreaterThan(0);
  });

  it.each([
    ['throws', { value: () => { throw new Error('division by zero.'); } }, /"broken" failed: division by zero, at the table 3,0,2 1,4,0 2,2,3/], // prettier-ignore
    ['gives NaN', { value: () => NaN }, /gave NaN/],
    ['gives a text', { value: () => '7' }, /gave a string, not a number/],
    ['gives nothing', { value: () => undefined }, /gave nothing, not a number/],
    ['gives a promise', { value: () => Promise.resolve(7) }, /gave a promise, not a number/],
    ['gives a whole number of another kind', { value: () => 7n }, /gave a bigint, not a number/],
    [
      'gives another number each time',
      {
        value: (
          (n) => () =>
            n++
        )(0),
      },
      /gave 0 and, asked again, 1/,
    ],
    ['writes on the margins', { value: (_: unknown, m: { rowTotals: number[] }) => (m.rowTotals[0] = 9) }, /read only/],
    ['gives NaN for another table only', { value: (t: ArrayLike<number>) => (t[0] === 3 ? 1 : NaN) }, /gave NaN/],
  ])('is a clear error where it %s', async (_, wrong, message) => {
    const problem = await refusal({ ...mine, name: 'broken', ...wrong });
    expect(problem).toMatchObject({ code: 'statistic-failed', exitStatus: 2 });
    expect(problem.message).toMatch(message);
  });

  it.each([
    ['no name', { ...mine, name: undefined }, 'not-a-statistic', /name/],
    ['no value', { ...mine, value: 3 }, 'not-a-statistic', /value/],
    ['a side that is none', { ...mine, sided: 'lower' }, 'not-a-statistic', /sided/],
    ['a function alone', () => 3, 'not-a-statistic', /name.*sided.*words.*value/],
    ['a built-in name', { ...mine, name: 'pearson' }, 'statistic-name-taken', /pearson/],
  ])('with %s is refused', async (_, statistic, code, message) => {
    const problem = await refusal(statistic);
    expect(problem.code).toBe(code);
    expect(problem.message).toMatch(message);
  });

  it('may write on the counts it is given: the tables that are counted stay as they are', async () => {
    const spoils: OwnStatistic = {
      ...mine,
      name: 'spoils',
      value: (t, margins) => {
        const found = mine.value(t, margins);
        (t as Float64Array).fill(0);
        return found;
      },
    };
    for (const options of [{}, { method: 'sample', draws: 2000, seed: 'own' }] satisfies PlanOptions[]) {
      const ours = await analyse({ counts }, { statistic: spoils, ...options });
      const theirs = await analyse({ counts }, { statistic: mine, ...options });
      expect(ours.pValues[0]).toMatchObject({ p: theirs.pValues[0]!.p, tied: theirs.pValues[0]!.tied });
    }
  });

  it('has no rule of probability and no asymptotic p', async () => {
    expect(await refusal(corner, { twoSidedRule: 'probability' })).toMatchObject({ code: 'rule-without-law' });
    expect(await refusal(mine, { method: 'asymptotic' })).toMatchObject({ code: 'no-asymptotic-form' });
  });
});
