// Parts of a run pooled are the run, byte for byte; parts that do not belong together are refused.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { mergeLines, type PartLines } from '../../src/record/merge-lines.js';
import { mergeParts, type Part } from '../../src/record/merge.js';
import { replay } from '../../src/record/replay.js';
import { checked } from '../helpers/checked-result.js';

const table = { counts: [[9, 4, 6, 3], [5, 8, 7, 9], [3, 9, 4, 8], [7, 6, 9, 5]] }; // prettier-ignore
const whole: PlanOptions = { method: 'sample', draws: 7500, seed: 'parts' };

const partsOf = (options: PlanOptions, of: number): Promise<Part[]> =>
  Promise.all(
    Array.from({ length: of }, async (_, k) => ({
      place: `part-${k + 1}.json`,
      value: JSON.parse(
        JSON.stringify(checked(await analyse(table, { ...options, shard: { index: k + 1, of } }))),
      ) as unknown,
    })),
  );

describe('parts of a run', () => {
  it.each([
    ['with the cells judged by the same draws', whole],
    ['with two tails doubled', { ...whole, statistic: 'trend', twoSidedRule: 'doubled' }],
    ['with a declared order, whose questions draw on their own', { ...whole, ordered: 'both' }],
    ['with comparisons', { ...whole, compare: 'rows' }],
  ] as [string, PlanOptions][])('pool to exactly the result of the whole: %s', async (_name, options) => {
    const single = await analyse(table, options);
    for (const of of [1, 3, 8]) {
      const merged = await mergeParts((await partsOf(options, of)).reverse());
      expect(JSON.stringify(merged)).toBe(JSON.stringify(single));
    }
  });

  it('make every draw once, and say that they are parts', async () => {
    const parts = await partsOf(whole, 3);
    const draws = parts.map(({ value }) => (value as { part: { draws: number } }).part.draws);
    expect(draws.reduce((a, b) => a + b)).toBe(7500);
    expect(JSON.stringify(parts[0]!.value)).toContain('part-of-a-run');
  });

  it('replay', async () => {
    for (const { value, place } of await partsOf(whole, 2))
      expect((await replay(value, place)).differences).toEqual([]);
  });
});

describe('refused', () => {
  it('gaps, overlaps, other runs, whole results and nonsense', async () => {
    const parts = await partsOf(whole, 3);
    const other = await partsOf({ ...whole, seed: 'another' }, 3);
    const fewer = await partsOf(whole, 2);
    const single = { place: 'whole.json', value: JSON.parse(JSON.stringify(await analyse(table, whole))) as unknown };
    await expect(mergeParts([])).rejects.toMatchObject({ code: 'parts-missing' });
    await expect(mergeParts(parts.slice(1))).rejects.toMatchObject({ code: 'parts-missing' });
    await expect(mergeParts([...parts, parts[0]!])).rejects.toMatchObject({ code: 'part-twice' });
    await expect(mergeParts([parts[0]!, other[1]!, parts[2]!])).rejects.toMatchObject({ code: 'parts-differ' });
    await expect(mergeParts([parts[0]!, fewer[1]!])).rejects.toMatchObject({ code: 'parts-differ' });
    await expect(mergeParts([single])).rejects.toMatchObject({ code: 'not-a-part' });
    await expect(mergeParts([{ place: 'x', value: {} }])).rejects.toMatchObject({ code: 'not-a-record' });
  });

  it.each([
    [{ method: 'sample' as const }, 'option-without-effect'],
    [{ method: 'exact' as const }, 'option-without-effect'],
    [{ method: 'sample' as const, draws: 1500 }, 'more-shards-than-blocks'],
  ])('to make a part with %j', async (options, code) => {
    await expect(analyse(table, { ...options, seed: 's', shard: { index: 1, of: 3 } })).rejects.toMatchObject({ code });
  });
});

describe('parts of a batch', () => {
  const end = (shard: string, lines: number, tables: number, seed = 's'): string =>
    JSON.stringify({ part: shard, lines, tables, input: '0'.repeat(64), run: { version: '1', seed } });
  const textOf = (shard: string, keys: readonly string[]): string[] =>
    keys.map((key) => `{"key":"${key}","shard":"${shard}","counts":[[1]]}`);
  const partOf = (shard: string, lines: readonly string[]): PartLines => ({
    place: shard,
    async *lines() {
      yield* lines;
    },
  });
  const part = (shard: string, tables: number, ...keys: string[]): PartLines =>
    partOf(shard, [...textOf(shard, keys), end(shard, keys.length, tables)]);

  async function merged(...parts: PartLines[]): Promise<string> {
    let text = '';
    for await (const piece of await mergeLines(parts)) text += piece;
    return text;
  }
  const problem = (...parts: PartLines[]): Promise<unknown> =>
    merged(...parts).catch((thrown: unknown) => (thrown as { code: string }).code);

  it('are woven together in the order of the tables', async () => {
    const text = await merged(part('2/3', 5, 'b', 'e'), part('1/3', 5, 'a', 'd'), part('3/3', 5, 'c'));
    expect(text).toBe(['a', 'b', 'c', 'd', 'e'].map((key) => `{"key":"${key}","counts":[[1]]}\n`).join(''));
  });

  it('may be empty where there are fewer tables than parts', async () => {
    expect(await merged(part('3/3', 2), part('1/3', 2, 'a'), part('2/3', 2, 'b'))).toBe(
      '{"key":"a","counts":[[1]]}\n{"key":"b","counts":[[1]]}\n',
    );
  });

  it('are refused with gaps, overlaps and parts of other runs', async () => {
    const [one, two] = [part('1/2', 2, 'a'), part('2/2', 2, 'b')];
    expect(await problem(one, one)).toBe('part-twice');
    expect(await problem(one)).toBe('parts-missing');
    expect(await problem(one, part('2/3', 2, 'b'))).toBe('parts-differ');
    expect(await problem(one, part('2/2', 3, 'b'))).toBe('parts-differ');
    expect(await problem(one, partOf('2/2', [...textOf('2/2', ['b']), end('2/2', 1, 2, 'another')]))).toBe(
      'parts-differ',
    );
    expect(await problem(two, partOf('x', ['{"key":"a","counts":[[1]]}']))).toBe('not-a-part');
  });

  it('are refused where the last line is missing, or any before it', async () => {
    const two = part('2/2', 4, 'b', 'd');
    expect(await problem(two, partOf('1/2', textOf('1/2', ['a', 'c'])))).toBe('part-cut-short');
    expect(await problem(two, partOf('1/2', [...textOf('1/2', ['a']), end('1/2', 2, 4)]))).toBe('part-cut-short');
    expect(await problem(two, part('1/2', 4, 'a'))).toBe('part-cut-short');
    expect(await problem(two, partOf('1/2', []))).toBe('part-cut-short');
  });
});
