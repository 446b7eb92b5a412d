// Strata and clusters as they are read: columns of records, blocks of a file, counts from a program.
import { describe, expect, it } from 'vitest';
import { readCrossTable, readRecords } from '../../src/input/index.js';
import { strataFromParts } from '../../src/input/strata.js';
import { piecesOf, problemOf, problemOfAsync } from './text-input.js';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);
const records = (text: string, options: object) => {
  const reread = () => piecesOf(bytes(text));
  return readRecords(reread(), { rows: 'group', columns: 'result', sourceName: 'r.csv', reread, ...options });
};

const visits = `ward,group,result,litter
A,x,ill,1
A,y,well,2
B,x,well,3
A,x,ill,1
B,z,ill,4
`;

describe('strata of records', () => {
  it('share their levels: one that a stratum lacks is an empty line there', async () => {
    const { table, strata, source } = await records(visits, { strata: 'ward' });
    expect(table.rowLabels).toEqual(['x', 'y', 'z']);
    expect(strata).toEqual([
      {
        label: 'A',
        counts: [
          [2, 0],
          [0, 1],
          [0, 0],
        ],
      },
      {
        label: 'B',
        counts: [
          [0, 1],
          [0, 0],
          [1, 0],
        ],
      },
    ]);
    expect(source.strataFrom).toBe('ward');
  });

  it('follow the order that is listed, and counts', async () => {
    const text = 'ward,group,result,n\nA,x,ill,3\nA,y,well,4\nB,y,ill,5\n';
    const { strata } = await records(text, { strata: 'ward', count: 'n', rowOrder: 'y,x', columnOrder: 'well,ill' });
    expect(strata!.map(({ counts }) => counts)).toEqual([
      [
        [4, 0],
        [0, 3],
      ],
      [
        [0, 5],
        [0, 0],
      ],
    ]);
  });

  it('a missing stratum is a missing value: refused, dropped or a stratum of its own', async () => {
    const text = 'ward,group,result\nA,x,ill\n,x,well\nA,y,well\n';
    const refused = await problemOfAsync(() => records(text, { strata: 'ward' }));
    expect([refused.code, refused.place]).toEqual(['missing-values', 'r.csv:3:1']);
    expect(refused.message).toContain('group, result or ward');
    const dropped = await records(text, { strata: 'ward', missing: 'drop' });
    expect([dropped.table.total, dropped.missing!.missingStratum, dropped.missing!.dropped]).toEqual([2, 1, 1]);
    const kept = await records(text, { strata: 'ward', missing: 'level' });
    expect(kept.strata!.map(({ label }) => label)).toEqual(['A', '(missing)']);
  });

  it('a stratum of totals is not counted twice', async () => {
    const text = 'ward,group,result,n\nA,x,ill,3\nA,y,well,4\nTotal,x,ill,3\n';
    expect((await problemOfAsync(() => records(text, { strata: 'ward', count: 'n' }))).code).toBe('total-stratum');
  });

  it('need a column of their own', async () => {
    const problem = await problemOfAsync(() => records(visits, { strata: 'group' }));
    expect([problem.code, problem.place]).toEqual(['same-column', '--strata']);
  });
});

describe('clusters of records', () => {
  it('carry their row and their counts by column', async () => {
    const { clusters, source } = await records(visits, { cluster: 'litter' });
    expect(clusters).toEqual([
      { label: '1', row: 0, counts: [2, 0] },
      { label: '2', row: 1, counts: [0, 1] },
      { label: '3', row: 0, counts: [0, 1] },
      { label: '4', row: 2, counts: [1, 0] },
    ]);
    expect(source.clusterFrom).toBe('litter');
  });

  it('one in two rows is refused with its name and its line', async () => {
    const problem = await problemOfAsync(() => records(`${visits}B,z,ill,2\n`, { cluster: 'litter' }));
    expect([problem.code, problem.place]).toEqual(['cluster-in-two-groups', 'r.csv:7:9']);
    expect(problem.message).toBe('cluster "2" has group "z" here and "y" before');
  });

  it('a missing one is refused even where missing values are a level', async () => {
    const text = 'litter,group,result\n1,x,ill\n,x,well\n2,y,well\n';
    const problem = await problemOfAsync(() => records(text, { cluster: 'litter', missing: 'level' }));
    expect([problem.code, problem.place]).toEqual(['missing-cluster', 'r.csv:3:1']);
    expect((await records(text, { cluster: 'litter', missing: 'drop' })).missing!.missingCluster).toBe(1);
  });
});

const cross = (text: string, options: object = {}) => readCrossTable(bytes(text), { sourceName: 't.csv', ...options });
const table = 'g,a,b\nx,1,2\ny,3,4\n';

describe('blocks of a cross-table', () => {
  it('with a line of one name each are strata', () => {
    const { strata, table: pooled, source } = cross(`north\n${table}\nsouth,,\ng,a,b\nx,5,6\nz,7,8\n`);
    expect(strata).toEqual([
      {
        label: 'north',
        counts: [
          [1, 2],
          [3, 4],
          [0, 0],
        ],
      },
      {
        label: 'south',
        counts: [
          [5, 6],
          [0, 0],
          [7, 8],
        ],
      },
    ]);
    expect(pooled.rowLabels).toEqual(['x', 'y', 'z']);
    expect(source).toMatchObject({ strataFrom: null, headerRow: true });
  });

  it('that repeat the header are strata, parted by lines of separators too', () => {
    for (const gap of ['\n', '\r\n\r\n', ',,\n']) {
      const { strata } = cross(`${table}${gap}${table}`);
      expect(strata!.map(({ label }) => label)).toEqual(['stratum 1', 'stratum 2']);
    }
  });

  it('are one table, as ever, where a blank line just stands in it', () => {
    const { strata, table: one } = cross('g,a,b\nx,1,2\n\ny,3,4\n');
    expect(strata).toBeUndefined();
    expect(one.counts).toEqual([
      [1, 2],
      [3, 4],
    ]);
    expect(cross('1,2\n\n3,4\n').strata).toBeUndefined();
  });

  it('are strata where they are asked for, and one block alone is refused', () => {
    const { strata, source } = cross('1,2\n3,4\n\n5,6\n7,8\n', { strata: 'clinic' });
    expect(strata!.map(({ counts }) => counts)).toEqual([
      [
        [1, 2],
        [3, 4],
      ],
      [
        [5, 6],
        [7, 8],
      ],
    ]);
    expect(source.strataFrom).toBe('clinic');
    expect(problemOf(() => cross(table, { strata: 'clinic' })).code).toBe('one-block');
  });

  it('may be empty of counts, but not of lines; no two of one name', () => {
    expect(cross(`p\n${table}\nq\ng,a,b\nx,0,0\ny,0,0\n`).strata![1]!.counts).toEqual([
      [0, 0],
      [0, 0],
    ]);
    expect(problemOf(() => cross(`p\n${table}\nq\n`)).code).toBe('empty-block');
    expect(problemOf(() => cross(`p\n${table}\np\n${table}`)).code).toBe('same-stratum');
  });

  it('keep the place of what is wrong in them', () => {
    expect(problemOf(() => cross(`p\n${table}\nq\ng,a,b\nx,1,-2\ny,1,2\n`)).place).toBe('t.csv:8:5');
  });
});

describe('strata from a program', () => {
  it('may have labels', () => {
    const { table: pooled, strata } = strataFromParts({
      strata: [
        [
          [1, 2],
          [3, 4],
        ],
        {
          label: 'B',
          counts: [
            [1, 0],
            [0, 1],
          ],
        },
      ],
    });
    expect(pooled.counts).toEqual([
      [2, 2],
      [3, 5],
    ]);
    expect(strata.map(({ label }) => label)).toEqual(['stratum 1', 'B']);
  });

  it('are refused where shapes differ, counts are none, or names repeat', () => {
    const code = (strata: Parameters<typeof strataFromParts>[0]['strata']): string =>
      problemOf(() => strataFromParts({ strata })).code;
    expect(code([])).toBe('no-strata');
    expect(
      code([
        [[1, 2]],
        [
          [1, 2],
          [3, 4],
        ],
      ]),
    ).toBe('strata-shape');
    expect(
      code([
        [
          [1, 2],
          [3, -4],
        ],
        [
          [1, 2],
          [3, 9],
        ],
      ]),
    ).toBe('negative-count');
    expect(
      code([
        { label: 'a', counts: [[1]] },
        { label: 'a', counts: [[1]] },
      ]),
    ).toBe('same-stratum');
  });
});
