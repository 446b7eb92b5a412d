// Which of the ways to give many tables was used: lines, one long file of records, or a list of files.
import { open } from 'node:fs/promises';
import { usageProblem } from '../../../problem/problem.js';
import { flagOf } from '../../arguments/option.js';
import type { Given } from '../choose-source.js';

export type TablesFrom =
  /** path null: standard input. */
  | { readonly form: 'lines' | 'records'; readonly path: string | null }
  | { readonly form: 'files'; readonly paths: readonly string[] };

const onlyRecords = ['by', 'rows', 'columns', 'count', 'cluster', 'family', 'missing'];
const onlyFiles = ['headerRow', 'labelColumn'];
const onlyLines = ['requireKeys'];
const onlyText = [
  'delimiter',
  'dropTotals',
  'keepTotals',
  'rowOrder',
  'columnOrder',
  'strata',
  'merge',
  'keep',
  'drop',
];

/** @returns undefined when nothing is named and no input is piped. @throws Problem (usage) */
export async function chooseTables(
  operands: readonly string[],
  given: Given,
  stdinIsTerminal: () => boolean,
): Promise<TablesFrom | undefined> {
  const [first, ...more] = operands;
  if (first === undefined && stdinIsTerminal()) return undefined;
  const path = first === undefined || first === '-' ? null : first;
  if (onlyRecords.some((name) => name in given)) {
    const missing = ['by', 'rows', 'columns'].find((name) => !(name in given));
    if (missing !== undefined) throw needsAll(missing);
    refuse(given, [...onlyFiles, ...onlyLines], 'one file of records');
    if (more.length > 0) throw oneAtATime('file of records');
    return { form: 'records', path };
  }
  if (more.length === 0 && (path === null || (await holdsLines(path)))) {
    refuse(given, [...onlyFiles, ...onlyText], 'tables given as lines of JSON');
    return { form: 'lines', path };
  }
  if (operands.includes('-')) throw oneAtATime('input, if it is standard input');
  refuse(given, onlyLines, 'tables given as files');
  return { form: 'files', paths: operands };
}

/** By its name, else by the first character in it. What cannot be read says so when it is read. */
async function holdsLines(path: string): Promise<boolean> {
  if (/\.(ndjson|jsonl)$/i.test(path)) return true;
  const file = await open(path).catch(() => undefined);
  if (file === undefined) return false;
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(1024), 0, 1024, 0);
    return /^\ufeff?\s*[{[]/.test(buffer.toString('utf8', 0, bytesRead));
  } catch {
    return false;
  } finally {
    await file.close();
  }
}

/** What to do instead, where there is something. */
const hints: Readonly<Record<string, string>> = {
  strata: 'a line names its own: {"key":"a","strata":[{"label":"north","counts":[[8,2],[1,9]]}]}',
};

function refuse(given: Given, names: readonly string[], beside: string): void {
  const name = names.find((each) => each in given);
  if (name === undefined) return;
  throw usageProblem({
    code: 'option-does-not-fit',
    message: `${flagOf(name)} does not go with ${beside}`,
    hint: hints[name] ?? `leave ${flagOf(name)} out`,
  });
}

const needsAll = (missing: string): Error =>
  usageProblem({
    code: 'records-need-columns',
    message: `${flagOf(missing)} is not given`,
    hint: 'tables in one file of records need all three: --by COLUMNS --rows COLUMN --columns COLUMN',
  });

const oneAtATime = (what: string): Error =>
  usageProblem({
    code: 'two-files',
    message: `one ${what} at a time`,
    hint: 'run keepsum batch once for each, or put them together first',
  });
