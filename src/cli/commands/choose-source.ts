// Which of the ways to give a table was used, settled from the words alone, before anything is read.
import { usageProblem } from '../../problem/problem.js';
import { looksLikeRow } from '../../input/inline.js';
import { flagOf } from '../arguments/option.js';
import { refuseRowSlips } from './row-slips.js';

export type Source =
  | { readonly form: 'inline'; readonly rows: readonly string[] }
  /** path null: standard input. */
  | { readonly form: 'cross-table' | 'records'; readonly path: string | null };

/** Which options were given (by name) decides too: `--rows` and `--columns` mean raw records. */
export type Given = Readonly<Record<string, unknown>>;

const onlyRecords = ['rows', 'columns', 'count', 'cluster', 'missing'];
const onlyCrossTables = ['rowLabels', 'columnLabels', 'headerRow', 'labelColumn'];
const onlyFiles = ['headerRow', 'labelColumn', 'delimiter', 'strata'];

/** @returns undefined when nothing is named and no input is piped. @throws Problem (usage) */
export function chooseSource(
  operands: readonly string[],
  given: Given,
  stdinIsTerminal: () => boolean,
): Source | undefined {
  refuseRowSlips(operands);
  const rows = operands.filter(looksLikeRow);
  const paths = operands.filter((operand) => !looksLikeRow(operand));
  refuseBothTotals(given);
  if (rows.length > 0 && paths.length > 0) throw rowsWithFiles(rows[0]!, paths[0]!);
  if (paths.some((path) => path.trim() === '')) throw emptyWord();
  if (paths.length > 1) throw twoFiles(paths);
  if (rows.length > 0) {
    refuse(given, [...onlyRecords, ...onlyFiles], 'rows typed in', 'is for files');
    return { form: 'inline', rows };
  }
  const form = onlyRecords.some((name) => name in given) ? 'records' : 'cross-table';
  if (form === 'records') {
    needBoth(given);
    refuse(given, onlyCrossTables, 'raw records (--rows and --columns)', 'is for tables of counts');
  }
  const [path] = paths;
  if (path === undefined && stdinIsTerminal()) return undefined;
  return { form, path: path === undefined || path === '-' ? null : path };
}

function refuse(given: Given, names: readonly string[], beside: string, purpose: string): void {
  const name = names.find((each) => each in given);
  if (name === undefined) return;
  throw usageProblem({
    code: 'option-does-not-fit',
    message: `${flagOf(name)} does not go with ${beside}`,
    hint: `${flagOf(name)} ${purpose}; leave it out`,
  });
}

function needBoth(given: Given): void {
  const missing = ['rows', 'columns'].find((name) => !(name in given));
  if (missing === undefined) return;
  const present = onlyRecords.find((name) => name in given)!;
  throw usageProblem({
    code: 'rows-without-columns',
    message: `${flagOf(present)} is given without ${flagOf(missing)}`,
    hint: 'raw records need both: --rows COLUMN --columns COLUMN; a table of counts needs neither',
  });
}

function refuseBothTotals(given: Given): void {
  if (!('dropTotals' in given && 'keepTotals' in given)) return;
  throw usageProblem({
    code: 'drop-and-keep-totals',
    message: '--drop-totals and --keep-totals contradict each other',
    hint: 'give one of them: --drop-totals to leave totals out, --keep-totals to count them as data',
  });
}

const rowsWithFiles = (row: string, path: string): Error =>
  usageProblem({
    code: 'rows-with-files',
    message: `"${row}" is a row of counts and "${path}" is not`,
    hint: `give rows only, or one file only; ./ in front makes any word a file: ./${row}`,
  });

const emptyWord = (): Error =>
  usageProblem({
    code: 'empty-word',
    message: 'a word of the command is empty, where a file or a row of counts is wanted',
    hint: 'a variable of the shell that holds nothing gives an empty word; leave it out to read standard input',
  });

const twoFiles = (paths: readonly string[]): Error =>
  usageProblem({
    code: 'two-files',
    message: `one table at a time, not ${paths.length} files ("${paths[0]!}", "${paths[1]!}")`,
    hint: 'run keepsum test once for each',
  });
