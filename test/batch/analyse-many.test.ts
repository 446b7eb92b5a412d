// What the library's generator does with keys, seeds, faults and sources.
import { describe, expect, it } from 'vitest';
import { analyseMany } from '../../src/batch/analyse-many.js';
import type { BatchLine, CompactLine } from '../../src/batch/lines.js';
import { checkedLine } from '../helpers/checked-lines.js';

const counts = [
  [9, 4, 3],
  [2, 8, 5],
];
const sampled = { method: 'sample', draws: 20_000 } as const;

async function all(tables: Iterable<unknown> | AsyncIterable<unknown>, plan = {}): Promise<CompactLine[]> {
  const found: CompactLine[] = [];
  for await (const one of analyseMany(tables as Iterable<BatchLine>, plan)) found.push(checkedLine(one) as CompactLine);
  return found;
}

describe('keys', () => {
  it('name streams: equal ones share one, a missing one is the number of the table', async () => {
    const [one, two, other, number, five] = await all(
      [{ key: 'a', counts }, { key: 'a', counts }, { key: 'b', counts }, { counts }, { key: 4, counts }],
      { ...sampled, seed: 's' },
    );
    expect(two).toEqual(one);
    expect(other!.pValues).not.toEqual(one!.pValues);
    expect(number!.key).toBe('4');
    expect(five).toEqual(number);
  });
});

describe('the plan of a compact line', () => {
  it('holds what differs from the defaults, and the seed only where tables were drawn', async () => {
    const [plain, spelledOut, drawn] = await all(
      [
        { counts },
        { counts, plan: { statistic: 'pearson', alpha: 0.05, method: 'exact' } },
        { counts, plan: { ...sampled, seed: 'mine' } },
      ],
      { seed: 'of the run' },
    );
    expect(plain!.plan).toEqual({});
    expect(spelledOut!.plan).toEqual({ method: 'exact' });
    expect(drawn!.plan).toEqual({ ...sampled, seed: 'mine' });
  });

  it('has one seed for the whole run where none was given', async () => {
    const found = await all([{ counts }, { counts }], sampled);
    expect(found[0]!.plan.seed).toMatch(/^[2-9a-z]{8}$/);
    expect(found[1]!.plan.seed).toBe(found[0]!.plan.seed);
    expect((await all([{ counts }], sampled))[0]!.plan.seed).not.toBe(found[0]!.plan.seed);
  });

  it('names a statistic of the user own', async () => {
    const statistic = { name: 'corner', sided: 'upper', words: 'the corner', value: (c: ArrayLike<number>) => c[0]! };
    const [found] = await all([{ counts }], { statistic });
    expect(found!.plan).toEqual({ statistic: 'corner' });
    expect(found!.statistic).toMatchObject({ name: 'corner', value: 9 });
  });
});

it('labels of the data come along, those of our own making do not', async () => {
  const [labelled, bare] = await all([
    { counts, rowLabels: ['x', 'y'] },
    { counts, rowLabels: ['row 1', 'row 2'] },
  ]);
  expect([labelled!.rowLabels, labelled!.columnLabels, bare!.rowLabels]).toEqual([['x', 'y'], undefined, undefined]);
});

describe('a table that cannot be used', () => {
  it.each<[string, unknown, string, string, RegExp]>([
    [
      'a negative count',
      {
        key: 'k',
        counts: [
          [1, 2],
          [3, -4],
        ],
      },
      'k',
      'negative-count',
      /counts\[1\]\[1\] is -4/,
    ],
    [
      'a count in quotes',
      {
        counts: [
          [1, 2],
          [3, '4'],
        ],
      },
      '1',
      'not-a-count',
      /counts\[1\]\[1\] is "4"/,
    ],
    [
      'a fraction',
      {
        counts: [
          [1, 2.5],
          [3, 4],
        ],
      },
      '1',
      'not-a-count',
      /counts\[0\]\[1\] is 2.5/,
    ],
    ['a ragged row', { counts: [[1, 2], [3]] }, '1', 'ragged-row', /1 counts where/],
    [
      'no counts at all',
      {
        counts: [
          [0, 0],
          [0, 0],
        ],
      },
      '1',
      'no-counts',
      /no counts at all/,
    ],
    [
      'a total beyond 2^53',
      {
        counts: [
          [2 ** 53 - 1, 1],
          [1, 1],
        ],
      },
      '1',
      'count-overflow',
      /2\^53/,
    ],
    ['two equal labels', { counts, rowLabels: ['a', 'a'] }, '1', 'duplicate-label', /"a"/],
    ['a slip in a field', { key: 'k', count: counts, counts }, 'k', 'unknown-field', /"count"/],
    ['a slip in an option', { counts, plan: { tial: 'both' } }, '1', 'unknown-field', /"tial" in plan/],
    ['an unknown value', { counts, plan: { statistic: 'pearsn' } }, '1', 'unknown-value', /"pearsn"/],
    ['an option out of range', { counts, plan: { alpha: 2 } }, '1', 'bad-field', /plan.alpha is 2/],
    [
      'options that do not go together',
      { counts, plan: { tail: 'both' } },
      '1',
      'tail-of-upper-statistic',
      /two-sided/,
    ],
    ['exact work over the bound', { counts, plan: { method: 'exact', effort: 1 } }, '1', 'exact-over-bound', /bound/],
    ['no table', [1], '1', 'not-a-table', /\[1\] is not an object/],
    ['nothing', null, '1', 'not-a-table', /null is not/],
    ['no counts field', { key: 3 }, '3', 'missing-field', /counts is missing/],
  ])('%s gives an error under its key, with its place, and the others go on', async (_, bad, key, code, message) => {
    const [fault, good] = await all([bad, { key: 'good', counts }]);
    expect(fault).toMatchObject({ key, error: { code, message: expect.stringMatching(message) } });
    const { place, hint } = (fault as unknown as { error: { place: string; hint: string } }).error;
    expect(place).toMatch(/^table 1\b/);
    expect(hint.length).toBeGreaterThan(10);
    expect(good!.pValues[0]!.method).toBe('exact');
  });
});

describe('the source', () => {
  it('may come slowly: each table is answered when it is there', async () => {
    let given = 0;
    async function* slowly(): AsyncGenerator<BatchLine> {
      for (; given < 5; given++) {
        await new Promise((resolve) => setTimeout(resolve, 2));
        yield { counts };
      }
    }
    const seen: number[] = [];
    for await (const one of analyseMany(slowly())) seen.push(given - Number(one.key));
    expect(Math.max(...seen)).toBeLessThanOrEqual(1);
    expect(seen).toHaveLength(5);
  });

  it('that fails does so after what came before it has been handed on', async () => {
    function* failing(): Generator<BatchLine> {
      yield { key: 'first', counts };
      yield { key: 'second', counts };
      throw new Error('torn cable');
    }
    const keys: string[] = [];
    await expect(async () => {
      for await (const { key } of analyseMany(failing())) keys.push(key);
    }).rejects.toThrow('torn cable');
    expect(keys).toEqual(['first', 'second']);
  });
});
