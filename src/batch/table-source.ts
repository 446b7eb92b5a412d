// Tables that were read from files, one by one or all before, in the chunks that a batch works on.
import type { TableItem } from './answer-table.js';
import type { Chunk, UnitSource } from './chunk.js';

export function tableSource(items: AsyncIterable<TableItem> | Iterable<TableItem>): UnitSource {
  const iterator = Symbol.asyncIterator in items ? items[Symbol.asyncIterator]() : items[Symbol.iterator]();
  return {
    async next(most): Promise<Chunk | null> {
      const tables: TableItem[] = [];
      while (tables.length < most) {
        const { done, value } = await iterator.next();
        if (done) break;
        tables.push(value);
      }
      return tables.length === 0 ? null : { kind: 'tables', tables };
    },
  };
}
