import type { RecordOptions } from './records.js';
import type { InputNote, ReadTable } from './read-table.js';

export interface KeyedOptions extends RecordOptions {
  readonly by: string;
}

export async function readKeyedRecords(
  _chunks: AsyncIterable<Uint8Array>,
  _options: KeyedOptions,
): Promise<{ tables: { key: string; read: ReadTable }[]; notes: InputNote[] }> {
  throw new Error('not yet');
}
