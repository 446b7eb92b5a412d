// The chosen source -> the table. What reads files is loaded only by the runs that need it.
import { readInline } from '../../input/inline.js';
import type { ReadTable } from '../../input/read-table.js';
import type { Values } from '../arguments/option.js';
import type { Shell } from '../shell.js';
import type { Source } from './choose-source.js';
import type { reading } from './options/reading.js';

type ReadingValues = Values<typeof reading>;

/** @throws Problem of the input stage, or that a file cannot be read. */
export async function readSource(source: Source, values: ReadingValues, shell: Shell): Promise<ReadTable> {
  const read = await readUnchanged(source, values, shell);
  const { merge, keep, drop } = values;
  if (merge === undefined && keep === undefined && drop === undefined) return read;
  const { changeLevels } = await import('../../input/level-changes.js');
  return changeLevels(read, { merge, keep, drop });
}

async function readUnchanged(source: Source, values: ReadingValues, shell: Shell): Promise<ReadTable> {
  const options = { ...values, totals: totalsRule(values) };
  if (source.form === 'inline') return readInline(source.rows, options);
  const { fileBytes, isPlainFile, pieces, whole } = await import('../streams/input-file.js');
  const { path } = source;
  const sourceName = path ?? 'standard input';
  const bytes = (): AsyncIterable<Uint8Array> => (path === null ? pieces(shell.stdin(), sourceName) : fileBytes(path));
  if (source.form === 'cross-table') {
    const { readCrossTable } = await import('../../input/cross-table.js');
    return readCrossTable(await whole(bytes(), sourceName), { ...options, sourceName });
  }
  const { readRecords } = await import('../../input/records.js');
  const reread = path !== null && (await isPlainFile(path)) ? bytes : undefined;
  return readRecords(bytes(), { ...options, rows: values.rows!, columns: values.columns!, sourceName, reread });
}

const totalsRule = ({ dropTotals, keepTotals }: ReadingValues): 'drop' | 'keep' | 'refuse' =>
  dropTotals ? 'drop' : keepTotals ? 'keep' : 'refuse';
