// Parts of a run pooled are the run, byte for byte; parts that do not belong together are refused.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { mergeLines } from '../../src/record/merge-lines.js';
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
  const line = (key: string, shard: string): string => `{"key":"${key}","shard":"${shard}","counts":[[1]]}`;
  const part = (shard: string, ...keys: string[]): { place: string; text: string } => ({
    place: shard,
    text: keys.map((key) => `${line(key, shard)}\n`).join(''),
  });

  it('are woven together in the order of the tables', () => {
    const merged = mergeLines([part('2/3', 'b', 'e'), part('1/3', 'a', 'd'), part('3/3', 'c')]);
    expect(merged).toBe(['a', 'b', 'c', 'd', 'e'].map((key) => `{"key":"${key}","counts":[[1]]}\n`).join(''));
  });

  it('are refused with gaps, overlaps and parts cut short', () => {
    const problem = (...parts: { place: string; text: string }[]): string => {
      try {
        return mergeLines(parts);
      } catch (thrown) {
        return (thrown as { code: string }).code;
      }
    };
    expect(problem(part('1/2', 'a'), part('1/2', 'b'))).toBe('part-twice');
    expect(problem(part('1/2', 'a'))).toBe('parts-missing');
    expect(problem(part('1/2', 'a'), part('2/3', 'b'))).toBe('parts-differ');
    expect(problem(part('1/2', 'a', 'c', 'e'), part('2/2', 'b'))).toBe('parts-differ');
  });
});
