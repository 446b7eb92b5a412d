// Many tables from one file of records: each is what its own records alone would give.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readKeyedRecords, type KeyedOptions } from '../../src/input/keyed-records.js';
import { readRecords } from '../../src/input/index.js';
import { Problem } from '../../src/problem/problem.js';
import { piecesOf } from './text-input.js';

const record = fc.record({
  site: fc.constantFrom('north', 'south', 'a,b', 'say "x"'),
  lesion: fc.constantFrom('1', '2'),
  dose: fc.constantFrom('none', 'low', 'high'),
  outcome: fc.constantFrom('yes', 'no'),
  n: fc.integer({ min: 1, max: 9 }),
});
type Row = { site: string; lesion: string; dose: string; outcome: string; n: number };

const field = (text: string): string => `"${text.replaceAll('"', '""')}"`;
const csvOf = (rows: readonly Row[]): Uint8Array =>
  Buffer.from(
    `site,lesion,dose,outcome,n\n${rows.map((r) => [field(r.site), r.lesion, r.dose, r.outcome, r.n].join(',')).join('\n')}\n`,
  );
const options = { by: 'site,lesion', rows: 'dose', columns: 'outcome', count: 'n', sourceName: 'x.csv' };

async function tablesOf(bytes: Uint8Array, more: Partial<KeyedOptions> = {}) {
  const { tables, notes, number } = await readKeyedRecords(piecesOf(bytes), { ...options, ...more });
  const all = [...tables];
  expect(all).toHaveLength(number);
  return { all, notes };
}

describe('records of many tables', () => {
  it('give each table its own records, over the rows and columns of all, in order of appearance', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(record, { minLength: 1, maxLength: 30 }), async (rows) => {
        const { all } = await tablesOf(csvOf(rows));
        const groups = new Map<string, Row[]>();
        for (const row of rows) {
          const name = JSON.stringify([row.site, row.lesion]);
          groups.set(name, [...(groups.get(name) ?? []), row]);
        }
        expect(all).toHaveLength(groups.size);
        const orders = {
          rowOrder: [...new Set(rows.map((r) => r.dose))].join(),
          columnOrder: [...new Set(rows.map((r) => r.outcome))].join(),
        };
        for (const [k, own] of [...groups.values()].entries()) {
          const alone = await readRecords(piecesOf(csvOf(own)), { ...options, ...orders });
          const found = all[k]!;
          expect('read' in found && found.read.table).toEqual(alone.table);
          const plain = [own[0]!.site, own[0]!.lesion].map((v) => (/[",]/.test(v) ? field(v) : v)).join();
          expect(found.key).toBe(plain);
        }
      }),
      { numRuns: 60 },
    );
  });
});

describe('what is wrong', () => {
  const codeOf = (text: string, more: Partial<KeyedOptions> = {}): Promise<string> =>
    tablesOf(Buffer.from(text), more).then(
      () => 'none',
      (thrown: unknown) => (thrown instanceof Problem ? `${thrown.code} ${thrown.place ?? ''}` : String(thrown)),
    );
  const two = 'site,lesion,dose,outcome,n\nnorth,1,low,yes,3\n,1,low,no,4\n';

  it('is said with its place', async () => {
    expect(await codeOf(two)).toMatch(/^missing-key x.csv/);
    expect(await codeOf(two, { by: 'sight' })).toBe('unknown-column --by');
    expect(await codeOf(two, { by: 'site,dose' })).toBe('same-column --by');
    expect(await codeOf(two.replace('3', '-3'))).toMatch(/^negative-count x.csv/);
  });

  it('records without a key can be left out or make a table of their own, and that is noted', async () => {
    const dropped = await tablesOf(Buffer.from(two), { missing: 'drop' });
    expect(dropped.all.map(({ key }) => key)).toEqual(['north,1']);
    expect(dropped.notes).toMatchObject([
      { code: 'missing-values', text: '1 of 2 records lack a value and were left out' },
    ]);
    const levels = await tablesOf(Buffer.from(two), { missing: 'level' });
    expect(levels.all.map(({ key }) => key)).toEqual(['north,1', '(missing),1']);
  });

  it('one table without counts does not stop the others', async () => {
    const { all } = await tablesOf(Buffer.from(two.replace(',1,low,no,4', 'south,1,low,no,0')));
    expect(all.map((one) => ('problem' in one ? one.problem.code : one.key))).toEqual(['north,1', 'no-counts']);
  });
});
