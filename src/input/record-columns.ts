// Which columns of raw records the names on the command line mean: an exact header name first, then a number from 1.
// Nothing is guessed; a near miss is suggested.
import type { Problem } from '../problem/problem.js';
import { usageProblem } from '../problem/problem.js';
import { nearest } from '../problem/suggest.js';
import { shownList, shownValue } from './shown-value.js';

export interface ColumnNames {
  /** A header name, or the number of a column. */
  readonly rows: string;
  readonly columns: string;
  readonly count?: string | undefined;
  readonly strata?: string | undefined;
  readonly cluster?: string | undefined;
  /** What the user calls the sides, where they are not --rows and --columns. */
  readonly sideOptions?: readonly [rows: string, columns: string];
}

/** Indexes from 0; `count` is -1 where every record counts once, `strata` and `cluster` where there are none. */
export interface RecordColumns {
  readonly rows: number;
  readonly columns: number;
  readonly count: number;
  readonly strata: number;
  readonly cluster: number;
  readonly rowsName: string;
  readonly columnsName: string;
  readonly countName: string | null;
  readonly strataName: string | null;
  readonly clusterName: string | null;
}

/**
 * @param header names as they stand in the first line
 * @throws Problem (usage): `unknown-column`, `ambiguous-column`, `same-column`
 */
export function findColumns(header: readonly string[], names: ColumnNames, sourceName: string): RecordColumns {
  const titles = header.map((name) => name.trim());
  const [rowsOption, columnsOption] = names.sideOptions ?? ['--rows', '--columns'];
  const rows = columnIndex(titles, names.rows, rowsOption, sourceName);
  const columns = columnIndex(titles, names.columns, columnsOption, sourceName);
  const count = names.count === undefined ? -1 : columnIndex(titles, names.count, '--count', sourceName);
  const strata = names.strata === undefined ? -1 : columnIndex(titles, names.strata, '--strata', sourceName);
  const cluster = names.cluster === undefined ? -1 : columnIndex(titles, names.cluster, '--cluster', sourceName);
  const used: [option: string, index: number][] = [];
  for (const [option, index] of [
    [rowsOption, rows],
    [columnsOption, columns],
    ['--count', count],
    ['--strata', strata],
    ['--cluster', cluster],
  ] as [string, number][]) {
    const earlier = used.find(([, other]) => other === index);
    if (earlier !== undefined && index >= 0) throw sameColumn(option, earlier[0], titles[index]!);
    used.push([option, index]);
  }
  const nameOf = (index: number): string => (titles[index] === '' ? `column ${index + 1}` : titles[index]!);
  return {
    rows,
    columns,
    count,
    strata,
    cluster,
    rowsName: nameOf(rows),
    columnsName: nameOf(columns),
    countName: count < 0 ? null : nameOf(count),
    strataName: strata < 0 ? null : nameOf(strata),
    clusterName: cluster < 0 ? null : nameOf(cluster),
  };
}

/** Index of the column that a name or number means. @throws Problem (usage): `unknown-column`, `ambiguous-column` */
export function columnIndex(titles: readonly string[], wanted: string, option: string, sourceName: string): number {
  const name = wanted.trim();
  const at = titles.indexOf(name);
  if (at >= 0 && name !== '') {
    const again = titles.indexOf(name, at + 1);
    if (again < 0) return at;
    throw usageProblem({
      code: 'ambiguous-column',
      message: `${sourceName} has more than one column named ${shownValue(name)}`,
      place: option,
      hint: `give its number instead: ${option} ${at + 1} or ${option} ${again + 1}`,
    });
  }
  const number = /^[0-9]+$/.test(name) ? Number(name) : 0;
  if (number >= 1 && number <= titles.length) return number - 1;
  throw unknownColumn(titles, name, option, sourceName);
}

function unknownColumn(titles: readonly string[], name: string, option: string, sourceName: string): Problem {
  const close = nearest(
    name,
    titles.filter((title) => title !== ''),
  );
  const suggestion = close === undefined ? '' : `did you mean ${shownValue(close).slice(1, -1)}? `;
  return usageProblem({
    code: 'unknown-column',
    message: `${sourceName} has no column named ${shownValue(name)}`,
    place: option,
    hint: `${suggestion}columns: ${shownList(titles.map((title, k) => (title === '' ? `${k + 1} (no name)` : title)))}`,
  });
}

export const sameColumn = (option: string, other: string, title: string): Problem =>
  usageProblem({
    code: 'same-column',
    message: `${option} and ${other} both name the column ${shownValue(title)}`,
    place: option,
    hint: 'name two different columns',
  });
