// Tables with strata, clusters, impossible cells and families in a batch: the answer that each has alone, and a line that replays.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { analyseMany } from '../../src/batch/analyse-many.js';
import { answerItem } from '../../src/batch/answer-table.js';
import type { BatchLine, CompactLine, ErrorLine, FullLine } from '../../src/batch/lines.js';
import { lineOf } from '../../src/batch/write-lines.js';
import { readRecords } from '../../src/input/index.js';
import { readKeyedRecords } from '../../src/input/keyed-records.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { reachOf } from '../../src/reach-of.js';
import { replay } from '../../src/record/replay.js';
import { checkedLine, isBatchLine } from '../helpers/checked-lines.js';
import { piecesOf } from '../input/text-input.js';

const strata = [
  { label: 'low', counts: [[6, 14], [1, 19]] }, // prettier-ignore
  { label: 'high', counts: [[9, 11], [7, 13]] }, // prettier-ignore
];
const labels = { rowLabels: ['Nordlund', 'Okafor'], columnLabels: ['leaked', 'tight'] };

async function all(tables: readonly BatchLine[], full = false): Promise<(CompactLine | FullLine | ErrorLine)[]> {
  const found = [];
  for await (const one of analyseMany(tables, { seed: 's' }, { full, threads: 1 } as never)) {
    found.push(checkedLine(one as CompactLine | FullLine | ErrorLine));
  }
  return found;
}
const plain = (value: unknown): Record<string, unknown> => JSON.parse(JSON.stringify(value)) as Record<string, unknown>;

describe('a line with strata', () => {
  const sampled: PlanOptions = { method: 'sample', draws: 2000 };

  it.each<[string, PlanOptions]>([
    ['exact', {}],
    ['sampled', sampled],
    ['of another statistic', { statistic: 'any-association' }],
    ['asymptotic', { method: 'asymptotic' }],
  ])('has the p-values and notes that analyse gives, and replays: %s', async (_, plan) => {
    const line = { key: 'seals', strata, ...labels, plan } as BatchLine;
    expect(isBatchLine(plain(line))).toBe(true);
    const alone = await analyse({ strata, ...labels }, { ...plan, seed: 's', tableKey: 'seals' });
    const [compact] = (await all([line])) as CompactLine[];
    expect(compact).toMatchObject({ strata, counts: [[15, 25], [8, 32]], ...labels }); // prettier-ignore
    expect(compact).toMatchObject({ statistic: alone.statistic, pValues: alone.pValues, notes: alone.notes });
    const [whole] = await all([line], true);
    expect(whole).toEqual({ key: 'seals', ...alone });
    for (const record of [compact, whole]) expect((await replay(plain(record), 'x')).differences).toEqual([]);
  });

  it('that was changed after it was written is found', async () => {
    const [line] = await all([{ key: 'seals', strata, ...labels } as BatchLine]);
    const changed = plain(line) as { strata: { counts: number[][] }[]; pValues: { p: number }[] };
    changed.strata[0]!.counts[0]![0]!++;
    await expect(replay(changed, 'x')).rejects.toMatchObject({ code: 'counts-differ' });
    const other = plain(line) as typeof changed;
    other.pValues[0]!.p /= 2;
    expect((await replay(other, 'x')).differences.map(({ field }) => field)).toEqual(['pValues[0].p']);
  });

  it('numbers strata that have no label', async () => {
    const [line] = (await all([{ strata: strata.map(({ counts }) => ({ counts })) }])) as CompactLine[];
    expect(line!.strata!.map(({ label }) => label)).toEqual(['stratum 1', 'stratum 2']);
  });

  it.each<[object, string, RegExp]>([
    [{ strata, counts: [[1, 2], [3, 4]] }, 'counts-and-strata', /both/], // prettier-ignore
    [{ strata: [{ counts: [[1, 2], [3, -4]] }] }, 'negative-count', /strata\[0\]\.counts\[1\]\[1\] is -4/], // prettier-ignore
    [{ strata: [strata[0], { label: 'low', counts: [[1, 2], [3, 4]] }] }, 'same-stratum', /"low"/], // prettier-ignore
    [{ strata: [strata[0], { counts: [[1, 2]] }] }, 'strata-shape', /another number/],
    [{ strata, plan: { paired: true } }, 'option-without-effect', /paired/],
    [{ strata, plan: { shard: { index: 1, of: 2 } } }, 'unknown-field', /"shard" in plan/],
  ])('that cannot be used says why: %j', async (line, code, message) => {
    const [found] = await all([line as BatchLine]);
    expect(found).toMatchObject({ error: { code, message: expect.stringMatching(message) as string } });
  });
});

it('impossible cells and families come along', async () => {
  const counts = [[0, 8, 3], [6, 0, 9], [4, 7, 5]]; // prettier-ignore
  const impossible = [[true, false, false], [false, true, false], [false, false, false]]; // prettier-ignore
  const [line] = await all([{ key: 'q', family: 'first', counts, impossible }]);
  expect(line).toMatchObject({ key: 'q', family: 'first', impossible });
  expect((await replay(plain(line), 'x')).differences).toEqual([]);
});

describe('records by key', () => {
  const header = 'site,dose,outcome,sex,litter,kind\n';
  const rows = Array.from({ length: 60 }, (_, k) => [
    ['north', 'south'][k % 2]!,
    ['none', 'high'][Math.floor(k / 4) % 2]!,
    ['ill', 'well'][Math.floor(k / 3) % 2]!,
    ['f', 'm', 'f'][k % 3]!,
    `litter ${Math.floor(k / 4)}`,
    ['a', 'b'][k % 2]!,
  ]);
  const bytes = (some: readonly string[][]): Uint8Array =>
    Buffer.from(header + some.map((row) => row.join()).join('\n'));
  const options = { by: 'site', rows: 'dose', columns: 'outcome', sourceName: 'x.csv' };

  it.each(['strata', 'cluster'] as const)(
    'with --%s give each table what its own records give, and replay',
    async (side) => {
      const column = side === 'strata' ? { strata: 'sex' } : { cluster: 'litter' };
      const settings = { wishes: { seed: 's' }, full: false, sourceName: '' };
      const { tables } = await readKeyedRecords(piecesOf(bytes(rows)), { ...options, ...column, family: 'kind' });
      let number = 0;
      for (const item of tables) {
        number++;
        const own = rows.filter(([site]) => site === item.key);
        const alone = await readRecords(piecesOf(bytes(own)), {
          ...options,
          ...column,
          rowOrder: 'none,high',
          columnOrder: 'ill,well',
        });
        const expected = await analyse(alone, { seed: 's', tableKey: item.key });
        const line = checkedLine(
          lineOf(await answerItem({ ...item, place: 'x' } as never, settings, {})),
        ) as CompactLine;
        expect(line).toMatchObject({
          key: item.key,
          family: item.key === 'north' ? 'a' : 'b',
          pValues: expected.pValues,
        });
        expect(side in line || 'clusters' in line).toBe(true);
        expect((await replay(plain(line), 'x')).differences).toEqual([]);
      }
      expect(number).toBe(2);
    },
  );

  it('keep clusters of one name in two tables apart, and refuse one with two rows', async () => {
    const own = [['north', 'none', 'ill', 'f', '1', 'a'], ['south', 'high', 'ill', 'f', '1', 'a']]; // prettier-ignore
    const read = (some: string[][]) => readKeyedRecords(piecesOf(bytes(some)), { ...options, cluster: 'litter' });
    expect((await read(own)).number).toBe(2);
    await expect(read([...own, ['south', 'none', 'ill', 'f', '1', 'a']])).rejects.toMatchObject({
      code: 'cluster-in-two-groups',
      place: 'x.csv, record 3',
    });
  });

  it.each(['strata', 'cluster'] as const)(
    'of thousands of scattered keys are counted as those of a few, with --%s',
    async (side) => {
      const column = side === 'strata' ? { strata: 'sex' } : { cluster: 'litter' };
      const many = [0, 1, 2].flatMap((round) =>
      Array.from({ length: 4500 }, (_, k) => [`site ${k}`, ['none', 'high'][round % 2]!, ['ill', 'well'][(k + round) % 2]!, ['f', 'm'][round % 2]!, `l${round}`, 'a']),
    ); // prettier-ignore
      const read = await readKeyedRecords(piecesOf(bytes(many)), { ...options, ...column, family: 'kind' });
      const tables = [...read.tables] as {
        key: string;
        family: string;
        read: Awaited<ReturnType<typeof readRecords>>;
      }[];
      expect(tables).toHaveLength(4500);
      for (const k of [0, 1, 4499]) {
        const { key, family, read: found } = tables[k]!;
        const alone = await readRecords(piecesOf(bytes(many.filter(([site]) => site === key))), {
          ...options,
          ...column,
          columnOrder: k % 2 ? 'well,ill' : 'ill,well',
        });
        expect([key, family]).toEqual([`site ${k}`, 'a']);
        const order = (labels: readonly string[]): string => labels.join();
        expect(order(found.table.columnLabels)).toBe('ill,well');
        expect(found.table.total).toBe(alone.table.total);
        expect(found.strata?.map(({ label }) => label)).toEqual(alone.strata?.map(({ label }) => label));
        expect(found.clusters?.map(({ label, row }) => [label, row])).toEqual(
          alone.clusters?.map(({ label, row }) => [label, row]),
        );
        expect(found.table.rowTotals).toEqual(alone.table.rowTotals);
        expect([...found.table.columnTotals].sort()).toEqual([...alone.table.columnTotals].sort());
      }
    },
  );

  it('refuse a table with two families', async () => {
    const two = [['north', 'none', 'ill', 'f', '1', 'a'], ['north', 'none', 'ill', 'f', '1', 'b']]; // prettier-ignore
    const read = readKeyedRecords(piecesOf(bytes(two)), { ...options, family: 'kind' });
    await expect(read).rejects.toMatchObject({ code: 'two-families', place: 'x.csv, record 2' });
  });
});

describe('what a table could attain', () => {
  it('is what a whole result says, also where the table is larger or its labels are named in the plan', async () => {
    for (const [counts, plan] of [
      [[[8, 2], [1, 9]], { statistic: 'wald', event: 'leaked' }], // prettier-ignore
      [[[4, 1, 0], [1, 3, 2]], {}], // prettier-ignore
      [[[3, 1, 0], [1, 2, 2]], { statistic: 'trend', tail: 'upper' }], // prettier-ignore
    ] as [number[][], PlanOptions][]) {
      const parts = counts[0]!.length === 2 ? { counts, ...labels } : { counts };
      const { pValues } = await analyse(parts, plan);
      expect(pValues[0]!.leastAttainable).toBeGreaterThan(0);
      expect(await reachOf(parts, plan)).toBe(pValues[0]!.leastAttainable);
    }
  });

  it('is not guessed for pairs and other designs', async () => {
    const counts = [[8, 2], [1, 9]]; // prettier-ignore
    for (const plan of [{ paired: true }, { fixed: 'rows' }] as PlanOptions[])
      expect(await reachOf({ counts }, plan)).toBeNull();
  });
});
