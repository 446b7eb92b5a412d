// Whole analyses of tables with impossible cells: how they are read, answered, shown and refused.
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import { readCrossTable } from '../src/input/cross-table.js';
import { changeLevels } from '../src/input/level-changes.js';
import { looksLikeRow, readInline } from '../src/input/inline.js';
import type { PlanOptions } from '../src/plan/plan.js';
import { render } from '../src/report/formats.js';
import type { Result } from '../src/result/result.js';
import { checked } from './helpers/checked-result.js';

const rows = ['a=-,8,3,5', 'b=6,-,9,2', 'c=4,7,-,1', 'd=2,3,12,-'];
const run = async (options: PlanOptions = {}, operands = rows): Promise<Result> =>
  checked(await analyse(readInline(operands), options));

describe('impossible cells', () => {
  it('are written as a hyphen, in rows typed in and in files; a hyphen alone is standard input', () => {
    expect(looksLikeRow('8,-,3')).toBe(true);
    expect(looksLikeRow('-')).toBe(false);
    const { table } = readCrossTable(new TextEncoder().encode(',x,y,z\na,-,2,3\nb,4,-,6\n'), {
      sourceName: 'f.csv',
      columnOrder: 'z,y,x',
    });
    expect(table.impossible).toEqual([
      [false, false, true],
      [false, true, false],
    ]);
    expect(readInline(['8,2', '1,9']).table.impossible).toBeUndefined();
  });

  it('are answered by a chain, whose p claims no error of drawing, the same for the same seed', async () => {
    const options = { method: 'sample', seed: 's', draws: 5000 } as const;
    const result = await run(options);
    expect(result.pValues[0]).toMatchObject({ method: 'sample', errors: [{ kind: 'chain', tables: 5000, chains: 1 }] });
    expect(result.statistic.degreesOfFreedom).toBe(5);
    expect(await run(options)).toEqual(result);
  });

  it('are answered exactly where the tables are few', async () => {
    const { pValues, quasiIndependence } = await run({}, ['-,2,1', '1,-,2', '2,1,-']);
    expect(pValues[0]).toMatchObject({ method: 'exact', statistic: 'pearson' });
    expect(quasiIndependence!.expected[0]![0]).toBeNull();
  });

  it('are shown as a hyphen, and typed again as one', async () => {
    const text = render(await run({ method: 'asymptotic' }), 'text');
    expect(text).toContain('a=-,8,3,5');
    expect(text).toContain('Expected counts under quasi-independence');
    expect(text).toMatch(/^ {2}a +- +8 +3 +5 +16$/m);
  });

  it('say where the table falls apart', async () => {
    const { notes, statistic } = await run({ method: 'asymptotic' }, ['3,4,-,-', '5,2,-,-', '-,-,6,1', '-,-,2,7']);
    expect(notes.map(({ code }) => code)).toContain('separable-blocks');
    expect(statistic.degreesOfFreedom).toBe(2);
  });

  it('are refused by what cannot take them', async () => {
    for (const options of [
      { statistic: 'probability' },
      { paired: true },
      { tail: 'lower' },
      { ordered: 'both' },
    ] as const) {
      await expect(run(options as PlanOptions)).rejects.toMatchObject({ code: 'impossible-cells' });
    }
    await expect(run({ method: 'sample', draws: 'auto' })).rejects.toMatchObject({ code: 'chain-of-fixed-length' });
    await expect(
      analyse({
        counts: [
          [1, 2],
          [3, 4],
        ],
        impossible: [
          [true, false],
          [false, false],
        ],
      }),
    ).rejects.toMatchObject({
      code: 'impossible-cell-counted',
    });
  });
});

describe('impossible cells elsewhere', () => {
  it('are refused in blocks that are strata, and kept when levels are merged whole', async () => {
    const blocks = new TextEncoder().encode('site,x,y\na,-,2\nb,4,5\n\nsite,x,y\na,1,2\nb,4,5\n');
    expect(() => readCrossTable(blocks, { sourceName: 'f.csv', strata: 'site' })).toThrow(/impossible/);
    const read = changeLevels(readInline(['a=-,8,3', 'b=6,-,9', 'c=4,-,7']), { merge: ['bc=b+c'] });
    expect(read.table.impossible).toEqual([
      [true, false, false],
      [false, true, false],
    ]);
    expect(() => changeLevels(read, { merge: ['all=a+bc'] })).toThrow(/impossible in part/);
  });
});
