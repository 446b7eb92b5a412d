// A result replays from itself: every analysis, every method; and whatever is changed in it is found.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { answerLine } from '../../src/batch/answer-table.js';
import { lineOf } from '../../src/batch/write-lines.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { replay } from '../../src/record/replay.js';
import { recordsIn } from '../../src/record/records-in.js';
import type { StrataParts } from '../../src/input/strata.js';
import { checked } from '../helpers/checked-result.js';

const two = { counts: [[8, 2], [1, 9]], rowLabels: ['treated', 'control'] }; // prettier-ignore
const large = { counts: [[4, 0, 3], [1, 5, 2], [0, 2, 6]] }; // prettier-ignore
const strata: StrataParts = { strata: [{ label: 'a', counts: [[3, 1], [1, 4]] }, { label: 'b', counts: [[5, 2], [2, 3]] }] }; // prettier-ignore
const square = { counts: [[20, 5, 1], [2, 15, 4], [1, 3, 9]], rowLabels: ['x', 'y', 'z'], columnLabels: ['x', 'y', 'z'] }; // prettier-ignore

const sampled = { method: 'sample', draws: 2000 } as const;
const cases: readonly [string, Parameters<typeof analyse>[0], PlanOptions][] = [
  ['pearson, exact', two, {}],
  ['wald with a rule and an event', two, { statistic: 'wald', twoSidedRule: 'doubled', groups: 'columns' }],
  ['power-divergence', large, { statistic: 'power-divergence', lambda: '1/2' }],
  ['sampled, a seed made for it', large, sampled],
  ['sampled until settled', large, { method: 'sample', seed: 's', mostDraws: 1e5 }],
  ['trend with scores', large, { statistic: 'trend', rowScores: [0, 1, 5], columnScores: 'midranks' }],
  ['a declared order', large, { ordered: 'both', draws: 1000 }],
  ['comparisons', large, { compare: 'rows', control: 'row 2' }],
  ['cells from draws of their own', { counts: [[9, 4, 6, 3], [5, 8, 7, 9], [3, 9, 4, 8], [7, 6, 9, 5]] }, { cells: true, method: 'asymptotic' }], // prettier-ignore
  ['one margin fixed', two, { fixed: 'rows' }],
  ['strata', strata, {}],
  ['strata, sampled', strata, { method: 'sample', draws: 1000, statistic: 'any-association' }],
  ['pairs', square, { paired: true }],
  ['agreement', square, { paired: true, statistic: 'kappa' }],
  ['impossible cells', { counts: [[0, 8, 3], [6, 0, 9], [4, 7, 0]], impossible: [[true, false, false], [false, true, false], [false, false, true]] }, {}], // prettier-ignore
  ['impossible cells, by a chain', { counts: [[0, 8, 3], [6, 0, 9], [4, 7, 0]], impossible: [[true, false, false], [false, true, false], [false, false, true]] }, { method: 'sample', draws: 1000 }], // prettier-ignore
  ['asymptotic', large, { method: 'asymptotic' }],
];

const plain = (value: unknown): unknown => JSON.parse(JSON.stringify(value));

describe('a result replays to the last digit', () => {
  it.each(cases)('%s', async (_name, data, options) => {
    const result = checked(await analyse(data, options));
    expect((await replay(plain(result), 'here')).differences).toEqual([]);
  });

  it('clusters too', async () => {
    const { makeTable } = await import('../../src/table/table.js');
    const clusters = [
      { label: 'a', row: 0, counts: [3, 1] },
      { label: 'b', row: 0, counts: [2, 0] },
      { label: 'c', row: 1, counts: [1, 4] },
      { label: 'd', row: 1, counts: [0, 2] },
      { label: 'e', row: 1, counts: [1, 4] },
    ];
    const read = {
      table: makeTable({ counts: [[5, 1], [2, 10]] }), // prettier-ignore
      clusters,
      source: { form: 'library' as const },
      sha256: null,
      missing: null,
      notes: [],
    };
    for (const options of [{}, { method: 'sample', draws: 1000, seed: 'c' }] as PlanOptions[]) {
      const result = checked(await analyse(read, options));
      expect((await replay(plain(result), 'here')).differences).toEqual([]);
    }
  });

  it('a compact line of a batch', async () => {
    for (const text of [
      '{"key":"a","counts":[[8,2],[1,9]],"rowLabels":["t","c"],"plan":{"statistic":"wald"}}',
      '{"counts":[[4,0,3],[1,5,2],[0,2,6]],"plan":{"method":"sample","draws":1000}}',
    ]) {
      const settings = { wishes: { seed: 'batch' }, full: false, sourceName: 'lines' };
      const line = lineOf(await answerLine(text, 1, settings, {}));
      expect((await replay(plain(line), 'here')).differences).toEqual([]);
    }
  });
});

describe('what was changed is found', () => {
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  const tampered: readonly [string, (result: Record<string, any>) => void, RegExp][] = [
    ['a count', (result) => { result['input'].counts[0][0]++; }, /./], // prettier-ignore
    ['a p', (result) => { result['pValues'][0].p *= 1 + 1e-15; }, /pValues\[0\]\.p/], // prettier-ignore
    ['a p beside', (result) => { result['pValues'][1].p = 0.5; }, /pValues\[1\]\.p/], // prettier-ignore
    ['the statistic', (result) => { result['statistic'].value += 1; }, /statistic\.value/], // prettier-ignore
    ['the plan', (result) => { result['plan'].tail = 'lower'; }, /plan\.tail/], // prettier-ignore
    ['the wishes', (result) => { result['plan'].asked.draws = 3000; }, /./], // prettier-ignore
    ['the seed', (result) => { result['plan'].seed = 'other'; }, /plan\.seed/], // prettier-ignore
    ['the sentence', (result) => { result['sentence'] += ' Indeed.'; }, /sentence/], // prettier-ignore
    ['a remark left out', (result) => { result['notes'] = []; }, /notes/], // prettier-ignore
  ];

  it.each(tampered)('%s', async (_name, change, field) => {
    const result = plain(await analyse({ counts: [[4, 0, 3], [1, 5, 2], [0, 0, 0], [0, 2, 6]] }, { ...sampled, seed: 's' })) as Record<string, unknown>; // prettier-ignore
    change(result);
    const { differences } = await replay(result, 'here');
    expect(differences.map((one) => one.field).join()).toMatch(field);
  });

  it('something that is no record is refused with its place', async () => {
    for (const wrong of [{}, 7, null, { schema: 'keepsum/result/1' }, { key: 'a', counts: [[1]] }]) {
      await expect(replay(wrong, 'file:3')).rejects.toMatchObject({ code: 'not-a-record', place: 'file:3' });
    }
  });
});

describe('records are found', () => {
  async function* lines(text: string): AsyncGenerator<string> {
    for (const line of text.split('\n')) yield line;
  }
  const all = async (text: string): Promise<unknown[]> => {
    const found: unknown[] = [];
    for await (const { record } of recordsIn(lines(text), 'file')) found.push(record);
    return found;
  };

  it('in one JSON text, in lines, and inside a page', async () => {
    expect(await all('{\n "a": 1\n}\n')).toEqual([{ a: 1 }]);
    expect(await all('{"a":1}\n\n{"a":2}\n')).toEqual([{ a: 1 }, { a: 2 }]);
    expect(
      await all('<!doctype html>\n<script type="application/json" id="keepsum-record">{"a":\n3}</script>'),
    ).toEqual([{ a: 3 }]);
  });

  it('or it is said where not', async () => {
    await expect(all('{"a":1}\nnonsense\n')).rejects.toMatchObject({ code: 'not-json', place: 'file:2' });
    await expect(all('<html></html>')).rejects.toMatchObject({ code: 'no-record-inside' });
  });
});
