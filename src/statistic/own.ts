// A statistic of the user's own: a name, words and a function of the counts. Nothing is known of it but its values, so
// tables are compared by those, in doubles.
import { usageProblem } from '../problem/problem.js';
import type { LiveTable } from '../table/live-table.js';
import type { BoundStatistic, Place, Sided, Statistic } from './contract.js';

/** What is held fixed; rows and columns without counts are left out. */
export interface Margins {
  readonly rows: number;
  readonly columns: number;
  readonly rowTotals: readonly number[];
  readonly columnTotals: readonly number[];
  readonly total: number;
}

/** The default export of a module named by --statistic, or an object passed in by a program. */
export interface OwnStatistic {
  /** Small letters, digits and hyphens; not the name of a built-in one. */
  readonly name: string;
  /** `upper`: larger is further from independence; `signed`: both directions count, about `centre`. */
  readonly sided: Sided;
  /** Plain words for the report. */
  readonly words: string;
  /**
   * The value for a table: counts[i * margins.columns + j], whole numbers. A number, infinite ones allowed; not NaN. Must
   * depend on its arguments alone, and give the same number for the same table.
   */
  value(counts: ArrayLike<number>, margins: Margins): number;
  /** Signed ones: the value from which distance is measured. Default 0. */
  readonly centre?: number;
  readonly formula?: string;
  readonly range?: string;
  readonly source?: string;
}

const nameShape = /^[a-z][a-z0-9-]{0,39}$/;

/** @throws Problem (usage) `not-a-statistic` with what is wrong, `statistic-name-taken`. */
export function ownStatistic(offered: unknown, taken: readonly string[]): Statistic {
  const own = checked(offered);
  if (taken.includes(own.name)) {
    throw usageProblem({
      code: 'statistic-name-taken',
      message: `there is a built-in statistic named "${own.name}"`,
      place: '--statistic',
      hint: `give yours another name, such as my-${own.name}`,
    });
  }
  return {
    name: own.name,
    sided: own.sided,
    shape: 'any',
    words: own.words,
    formula: own.formula ?? 'as its function computes it',
    range: own.range ?? 'not stated',
    source: own.source ?? 'the user’s own',
    limit: 'none',
    own: true,
    bind: (live) => bindOwn(own, live),
  };
}

function checked(offered: unknown): OwnStatistic {
  const own = (typeof offered === 'object' && offered !== null ? offered : {}) as Partial<Record<string, unknown>>;
  const wrong = [
    ...(typeof own['name'] === 'string' && nameShape.test(own['name'])
      ? []
      : ['name (small letters, digits and hyphens)']),
    ...(own['sided'] === 'upper' || own['sided'] === 'signed' ? [] : ["sided ('upper' or 'signed')"]),
    ...(typeof own['words'] === 'string' && own['words'].trim() !== '' ? [] : ['words (a text)']),
    ...(typeof own['value'] === 'function' ? [] : ['value (a function of counts and margins)']),
    ...(own['centre'] === undefined || Number.isFinite(own['centre']) ? [] : ['centre (a finite number)']),
    ...['formula', 'range', 'source'].filter((key) => own[key] !== undefined && typeof own[key] !== 'string'),
  ];
  if (wrong.length === 0) return offered as OwnStatistic;
  throw usageProblem({
    code: 'not-a-statistic',
    message: `this is no statistic; missing or of the wrong kind: ${wrong.join(', ')}`,
    place: '--statistic',
    hint: "export default { name: 'mine', sided: 'upper', words: 'my statistic', value: (counts, margins) => ... }",
  });
}

function bindOwn(own: OwnStatistic, live: LiveTable): BoundStatistic {
  const { rows, columns, rowTotals, columnTotals, total } = live;
  // A function that writes on what it is given, or sorts it, must not disturb the tables that are counted.
  const sheet = new Float64Array(rows * columns);
  const margins: Margins = Object.freeze({
    rows,
    columns,
    rowTotals: Object.freeze([...rowTotals]),
    columnTotals: Object.freeze([...columnTotals]),
    total,
  });
  const value = (counts: ArrayLike<number>): number => {
    let found: unknown;
    sheet.set(counts);
    try {
      found = own.value(sheet, margins);
    } catch (thrown) {
      throw failure(own, live, counts, `failed: ${thrown instanceof Error ? thrown.message : String(thrown)}`);
    }
    if (typeof found === 'number' && !Number.isNaN(found)) return found;
    throw failure(own, live, counts, `gave ${kindOf(found)}`);
  };
  const observed = value(live.counts);
  const again = value(live.counts);
  if (again !== observed) {
    throw failure(own, live, live.counts, `gave ${observed} and, asked again, ${again}`);
  }
  const centre = own.centre ?? 0;
  const compare = (a: number, b: number): Place => (a > b ? 1 : a < b ? -1 : 0);
  return {
    value,
    place: (counts) => compare(value(counts), observed),
    distance: (counts) => compare(Math.abs(value(counts) - centre), Math.abs(observed - centre)),
  };
}

function kindOf(found: unknown): string {
  if (typeof found === 'number') return 'NaN';
  if (found === undefined || found === null) return `${found === null ? 'null' : 'nothing'}, not a number`;
  if (found instanceof Promise) return 'a promise, not a number';
  return `${typeof found === 'object' ? 'an object' : `a ${typeof found}`}, not a number`;
}

function failure(own: OwnStatistic, live: LiveTable, counts: ArrayLike<number>, what: string): Error {
  const rows = Array.from({ length: live.rows }, (_, i) =>
    Array.from({ length: live.columns }, (__, j) => counts[i * live.columns + j]).join(),
  );
  const table = rows.join(' ');
  return usageProblem({
    code: 'statistic-failed',
    message: `the statistic "${own.name}" ${what.replace(/[.\s]+$/, '')}, at the table ${table.length > 80 ? `${table.slice(0, 79)}…` : table}`,
    place: '--statistic',
    hint: 'it must give a number for every table with these margins, and always the same; try it on this one',
  });
}
