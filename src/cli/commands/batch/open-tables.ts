// The chosen tables as a source of units, and how far it is read.
import { errorOf, type TableItem } from '../../../batch/answer-table.js';
import type { UnitSource } from '../../../batch/chunk.js';
import { LineSource } from '../../../batch/line-source.js';
import { tableSource } from '../../../batch/table-source.js';
import { changeLevels, planLevels } from '../../../input/level-changes.js';
import { Problem } from '../../../problem/problem.js';
import type { Values } from '../../arguments/option.js';
import type { Shell } from '../../shell.js';
import { fileBytes, pieces, plainSize, whole } from '../../streams/input-file.js';
import type { TablesFrom } from './choose-tables.js';
import type { readingTables } from './options.js';

export type ReadingValues = Values<typeof readingTables>;

export interface OpenTables {
  readonly source: UnitSource;
  /** How places name the input. */
  readonly sourceName: string;
  /** Share of the input that is read, 0 to 1; undefined where its length is not known. */
  share(): number | undefined;
  /** Remarks on the input as a whole. */
  readonly remarks: readonly string[];
}

export async function openTables(
  from: TablesFrom,
  { allowErrors = false, ...values }: ReadingValues & { readonly allowErrors?: boolean },
  shell: Shell,
): Promise<OpenTables> {
  if (from.form === 'files') return filesInTurn(from.paths, values);
  const { path } = from;
  const sourceName = path ?? 'standard input';
  const bytes = (): AsyncIterable<Uint8Array> => (path === null ? pieces(shell.stdin(), sourceName) : fileBytes(path));
  const size = path === null ? undefined : await plainSize(path);
  if (from.form === 'records') {
    const { readKeyedRecords } = await import('../../../input/keyed-records.js');
    const { tables, number, notes, rowLabels, columnLabels } = await readKeyedRecords(bytes(), {
      ...values,
      by: values.by!,
      rows: values.rows!,
      columns: values.columns!,
      totals: totalsRule(values),
      sourceName,
      ...(size === undefined ? {} : { reread: bytes }),
    });
    // All tables have the same levels, so that a slip is one of the whole run.
    planLevels(rowLabels, columnLabels, values);
    const items = function* (): Generator<TableItem> {
      for (const table of tables) {
        const place = `${sourceName}, table "${table.key}"`;
        if ('read' in table) yield changed({ ...table, place }, values);
        else yield { key: table.key, error: errorOf(table.problem, place) };
      }
    };
    return { ...counted(items(), number), sourceName, remarks: notes.map(({ text }) => text) };
  }
  const source = new LineSource(bytes(), sourceName, allowErrors);
  const share = (): number | undefined => (size === undefined ? undefined : source.bytesRead / size);
  return { source, sourceName, share, remarks: [] };
}

function filesInTurn(paths: readonly string[], values: ReadingValues): OpenTables {
  const read = async function* (): AsyncGenerator<TableItem> {
    const { readCrossTable } = await import('../../../input/cross-table.js');
    for (const path of paths) {
      try {
        const bytes = await whole(fileBytes(path), path);
        const table = readCrossTable(bytes, { ...values, totals: totalsRule(values), sourceName: path });
        yield changed({ key: path, read: table, place: path }, values);
      } catch (thrown) {
        if (!(thrown instanceof Problem)) throw thrown;
        yield { key: path, error: errorOf(thrown, path) };
      }
    }
  };
  return { ...counted(read(), paths.length), sourceName: '', remarks: [] };
}

/** Levels merged, kept or dropped; one that a table lacks is its problem. */
function changed(item: Extract<TableItem, { read: unknown }>, { merge, keep, drop }: ReadingValues): TableItem {
  if (merge === undefined && keep === undefined && drop === undefined) return item;
  try {
    return { ...item, read: changeLevels(item.read, { merge, keep, drop }) };
  } catch (thrown) {
    if (!(thrown instanceof Problem)) throw thrown;
    return { key: item.key, error: errorOf(thrown, item.place) };
  }
}

function counted(
  items: Iterable<TableItem> | AsyncIterable<TableItem>,
  all: number,
): Pick<OpenTables, 'source' | 'share'> {
  const inner = tableSource(items);
  let done = 0;
  return {
    source: {
      async next(most) {
        const chunk = await inner.next(most);
        if (chunk?.kind === 'tables') done += chunk.tables.length;
        return chunk;
      },
    },
    share: () => done / all,
  };
}

const totalsRule = ({ dropTotals, keepTotals }: ReadingValues): 'drop' | 'keep' | 'refuse' =>
  dropTotals ? 'drop' : keepTotals ? 'keep' : 'refuse';
