import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { changeLevels, planLevels, regroup, type LevelWishes } from '../../src/input/level-changes.js';
import { readInline } from '../../src/input/inline.js';
import type { ReadTable } from '../../src/input/read-table.js';
import { Problem } from '../../src/problem/problem.js';
import { analyse } from '../../src/analyse.js';
import { render } from '../../src/report/formats.js';
import { checked } from '../helpers/checked-result.js';
import { tableOf } from '../helpers/tables.js';

const moss = (): ReadTable =>
  readInline(['north=5,1,0', 'east=2,3,1', 'south=0,2,6', 'flat=1,1,1'], { columnLabels: 'dense,thin,bare' });
const changedBy = (wishes: LevelWishes, read = moss()): ReadTable => changeLevels(read, wishes);
const counts = (read: ReadTable): readonly (readonly number[])[] => read.table.counts;

function problemOf(wishes: LevelWishes, read = moss()): Problem {
  try {
    changeLevels(read, wishes);
  } catch (thrown) {
    if (thrown instanceof Problem) return thrown;
  }
  throw new Error('no problem was thrown');
}

describe('merge, keep, drop', () => {
  it('adds merged lines where the first of them stood', () => {
    const read = changedBy({ merge: ['sunny=south+east'] });
    expect(read.table.rowLabels).toEqual(['north', 'sunny', 'flat']);
    expect(counts(read)).toEqual([
      [5, 1, 0],
      [2, 5, 7],
      [1, 1, 1],
    ]);
    expect(read.levels).toEqual({
      changes: [{ action: 'merge', side: 'rows', into: 'sunny', labels: ['south', 'east'] }],
      leftOut: 0,
    });
  });

  it('takes the side from the labels, and merges before it keeps or drops', () => {
    const read = changedBy({ drop: ['flat', 'cover'], merge: ['cover=dense+thin', 'slope=north+east'] });
    expect(read.table.rowLabels).toEqual(['slope', 'south']);
    expect(read.table.columnLabels).toEqual(['bare']);
    expect(counts(read)).toEqual([[1], [6]]);
    expect(read.levels!.leftOut).toBe(moss().table.total - 7);
  });

  it('keeps levels in the order of the table', () => {
    expect(changedBy({ keep: ['south,north'] }).table.rowLabels).toEqual(['north', 'south']);
  });

  it('reads labels with marks in double quotes', () => {
    const read = readInline(['1,2', '3,4', '5,6'], { rowLabels: '"a+b","c=d, e","say ""x"""' });
    const changed = changedBy({ merge: ['"new=1"="a+b"+"say ""x"""'], keep: ['rows:"new=1","c=d, e"'] }, read);
    expect(changed.table.rowLabels).toEqual(['new=1', 'c=d, e']);
    expect(counts(changed)[0]).toEqual([6, 8]);
  });

  it('is nothing at all where nothing is wished', () => {
    const read = moss();
    expect(changeLevels(read, {})).toBe(read);
  });

  it('serves several tables with one plan: strata add up as the whole does', () => {
    fc.assert(
      fc.property(
        tableOf({ rows: [3, 3], columns: [3, 3], largest: 9 }),
        tableOf({ rows: [3, 3], columns: [3, 3], largest: 9 }),
        (a, b) => {
          const plan = planLevels(['a', 'b', 'c'], ['x', 'y', 'z'], { merge: ['ab=c+a'], drop: ['y'] });
          const whole = a.map((row, i) => row.map((n, j) => n + b[i]![j]!));
          const [one, other, both] = [regroup(a, plan), regroup(b, plan), regroup(whole, plan)];
          expect(both).toEqual(one.map((row, i) => row.map((n, j) => n + other[i]![j]!)));
          expect(one[0]).toEqual([a[0]![0]! + a[2]![0]!, a[0]![2]! + a[2]![2]!]);
        },
      ),
      { numRuns: 100, seed: 1 },
    );
  });
});

describe('what is wrong is said', () => {
  it.each([
    [{ keep: ['north,estt'] }, 'unknown-level', 'did you mean "east"'],
    [{ drop: ['columns:north'] }, 'unknown-level', 'there are: dense, thin, bare'],
    [{ drop: ['wet'] }, 'unknown-level', 'there are: north, east, south, flat, dense, thin, bare'],
    [{ merge: ['north+east'] }, 'bad-merge', '--merge new=a+b'],
    [{ merge: ['flat=north+east'] }, 'duplicate-label', 'choose another label'],
    [{ merge: ['x=north+north'] }, 'duplicate-label', 'name each level once'],
    [{ merge: ['=north+east'] }, 'empty-label', 'new=a+b'],
    [{ keep: ['north,east'], drop: ['south'] }, 'unknown-level', 'there are: north, east'],
    [{ drop: ['dense,thin,bare'] }, 'no-level-left', 'at least one'],
  ] as const)('%o: %s', (wishes, code, hint) => {
    const problem = problemOf(wishes);
    expect(problem.code).toBe(code);
    expect(problem.hint).toContain(hint);
  });

  it('a label on both sides needs rows: or columns:', () => {
    const read = readInline(['yes=3,1', 'no=2,5', 'perhaps=1,1'], { columnLabels: 'yes,no' });
    const problem = problemOf({ drop: ['no'] }, read);
    expect(problem.code).toBe('ambiguous-level');
    expect(problem.hint).toContain("--drop 'rows:no' or --drop 'columns:no'");
    expect(changedBy({ drop: ['rows:no'] }, read).table.rowLabels).toEqual(['yes', 'perhaps']);
  });
});

it('stands in the result, the report and the methods paragraph', async () => {
  const result = checked(await analyse(changedBy({ merge: ['sunny=south+east'], drop: ['flat'] })));
  expect(result.input.levels!.changes).toHaveLength(2);
  expect(result.input.levels!.leftOut).toBe(3);
  const words =
    'Before anything else, rows "south", "east" were merged into "sunny"; rows "flat" were left out (3 counts left out).';
  expect(render(result, 'text', { width: 1000 }).replace(/\n +/g, ' ')).toContain(words);
  expect(result.methods).toContain(words);
});
