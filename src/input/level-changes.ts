// Levels merged, kept or dropped before anything else is done with a table. The same plan serves one table and many that share their
// levels (strata). What was done, and how many counts it left out, goes into the result.
import { nearest } from '../problem/suggest.js';
import { dataProblem, usageProblem, type Problem } from '../problem/problem.js';
import { makeTable } from '../table/table.js';
import { readWishes, type LevelSide, type LevelWish, type LevelWishes } from './level-wishes.js';
import type { Cluster, ReadTable } from './read-table.js';
import { shownList, shownValue } from './shown-value.js';

export type { LevelWishes } from './level-wishes.js';

export interface LevelChange {
  readonly action: 'merge' | 'keep' | 'drop';
  readonly side: LevelSide;
  /** Of a merge: the new level. */
  readonly into?: string;
  readonly labels: readonly string[];
}

export interface LevelRecord {
  readonly changes: readonly LevelChange[];
  /** Counts of the levels that were not kept. */
  readonly leftOut: number;
}

interface Level {
  readonly label: string;
  /** Indexes of the lines that it is made of. */
  readonly from: readonly number[];
}

export interface LevelPlan {
  readonly rows: readonly Level[];
  readonly columns: readonly Level[];
  readonly changes: readonly LevelChange[];
}

/**
 * Merges first, then keeps, then drops; a merged level stands where the first of its parts stood.
 * @throws Problem (usage): `unknown-level`, `ambiguous-level`, `duplicate-label`, `no-level-left`, and of level-wishes.
 */
export function planLevels(
  rowLabels: readonly string[],
  columnLabels: readonly string[],
  wishes: LevelWishes,
): LevelPlan {
  const single = (label: string, index: number): Level => ({ label, from: [index] });
  const levels = { rows: rowLabels.map(single), columns: columnLabels.map(single) };
  const changes: LevelChange[] = [];
  for (const wish of readWishes(wishes)) {
    const side = sideFor(wish, levels);
    levels[side] = changed(levels[side], wish);
    if (levels[side].length === 0) {
      throw problem(
        'no-level-left',
        `nothing is left of the ${side}`,
        wish,
        'leave at least one level; two for a test',
      );
    }
    changes.push(carriedOut(wish, side));
  }
  return { ...levels, changes };
}

/** Counts by the lines of a plan: of any table with the labels that the plan was made for. */
export const regroup = (counts: readonly (readonly number[])[], { rows, columns }: LevelPlan): number[][] =>
  rows.map((row) =>
    columns.map((column) =>
      row.from.reduce((sum, i) => sum + column.from.reduce((part, j) => part + counts[i]![j]!, 0), 0),
    ),
  );

/** The table as wished, with the record of it; the very same where nothing is wished. */
export function changeLevels(read: ReadTable, wishes: LevelWishes): ReadTable {
  const { table } = read;
  const plan = planLevels(table.rowLabels, table.columnLabels, wishes);
  if (plan.changes.length === 0) return read;
  const labels = (lines: readonly Level[]): string[] => lines.map(({ label }) => label);
  const changedTable = makeTable({
    counts: regroup(table.counts, plan),
    ...(table.impossible === undefined ? {} : { impossible: impossibleAfter(table.impossible, plan) }),
    rowLabels: labels(plan.rows),
    columnLabels: labels(plan.columns),
  });
  return {
    ...read,
    table: changedTable,
    ...(read.strata === undefined
      ? {}
      : { strata: read.strata.map(({ label, counts }) => ({ label, counts: regroup(counts, plan) })) }),
    ...(read.clusters === undefined ? {} : { clusters: regroupedClusters(read.clusters, plan) }),
    levels: { changes: plan.changes, leftOut: table.total - changedTable.total },
  };
}

/** Clusters follow their rows; those in a row that is left out, or left without counts, go. */
function regroupedClusters(clusters: readonly Cluster[], { rows, columns }: LevelPlan): Cluster[] {
  return clusters.flatMap(({ label, row: before, counts: all }) => {
    const row = rows.findIndex(({ from }) => from.includes(before));
    const counts = columns.map(({ from }) => from.reduce((sum, j) => sum + all[j]!, 0));
    return row < 0 || counts.every((n) => n === 0) ? [] : [{ label, row, counts }];
  });
}

/** @throws Problem (data) `mixed-cells` where a merged cell would be impossible in part. */
const impossibleAfter = (impossible: readonly (readonly boolean[])[], { rows, columns }: LevelPlan): boolean[][] =>
  rows.map((row) =>
    columns.map((column) => {
      const parts = row.from.flatMap((i) => column.from.map((j) => impossible[i]![j]!));
      if (parts.includes(true) && parts.includes(false)) {
        throw dataProblem({
          code: 'mixed-cells',
          message: `the cell of "${row.label}" and "${column.label}" would be impossible in part`,
          place: '--merge',
          hint: 'merge only levels that are impossible (-) in the same cells',
        });
      }
      return parts.includes(true);
    }),
  );

function changed(levels: readonly Level[], wish: LevelWish): Level[] {
  const isNamed = ({ label }: Level): boolean => wish.labels.includes(label);
  if (wish.option === '--keep') return levels.filter(isNamed);
  const others = levels.filter((level) => !isNamed(level));
  if (wish.option === '--drop') return others;
  const into = wish.into!;
  if (others.some(({ label }) => label === into)) {
    throw problem(
      'duplicate-label',
      `there is a level ${shownValue(into)} already`,
      wish,
      'name it among those merged, or choose another label',
    );
  }
  const merged = { label: into, from: levels.filter(isNamed).flatMap(({ from }) => from) };
  const first = levels.findIndex(isNamed);
  return levels.flatMap((level, index) => (index === first ? [merged] : isNamed(level) ? [] : [level]));
}

const actions = { '--merge': 'merge', '--keep': 'keep', '--drop': 'drop' } as const;

const carriedOut = ({ option, into, labels }: LevelWish, side: LevelSide): LevelChange => ({
  action: actions[option],
  side,
  ...(into === undefined ? {} : { into }),
  labels,
});

type Levels = Readonly<Record<LevelSide, readonly Level[]>>;

/** The side that is named, or the only one on which all labels occur. */
function sideFor(wish: LevelWish, levels: Levels): LevelSide {
  const labelsOf = (side: LevelSide): string[] => levels[side].map(({ label }) => label);
  const lacks = (side: LevelSide): string | undefined => wish.labels.find((label) => !labelsOf(side).includes(label));
  const sides = wish.side === undefined ? (['rows', 'columns'] as const) : [wish.side];
  const fitting = sides.filter((side) => lacks(side) === undefined);
  if (fitting.length === 1) return fitting[0]!;
  if (fitting.length === 2) {
    const hint = `say which: ${wish.option} 'rows:${wish.text}' or ${wish.option} 'columns:${wish.text}'`;
    const several = wish.labels.length > 1 ? 'are' : 'is';
    throw problem(
      'ambiguous-level',
      `${shownList(wish.labels)} ${several} found among the rows and among the columns`,
      wish,
      hint,
    );
  }
  // The side that most labels fit is the one that was meant.
  const meant = [...sides].sort((a, b) => found(labelsOf(b), wish) - found(labelsOf(a), wish))[0]!;
  const isOneSided = wish.side !== undefined || found(labelsOf(meant), wish) > 0;
  const known = isOneSided ? labelsOf(meant) : sides.flatMap(labelsOf);
  const missing = isOneSided ? lacks(meant)! : wish.labels[0]!;
  const close = nearest(missing, known);
  const suggestion = close === undefined ? '' : `did you mean ${shownValue(close)}? `;
  throw problem(
    'unknown-level',
    `there is no level ${shownValue(missing)}${isOneSided ? ` among the ${meant}` : ''}`,
    wish,
    `${suggestion}there are: ${shownList(known)}`,
  );
}

const found = (labels: readonly string[], wish: LevelWish): number =>
  wish.labels.filter((label) => labels.includes(label)).length;

const problem = (code: string, message: string, { option }: LevelWish, hint: string): Problem =>
  usageProblem({ code, message, place: option, hint });
