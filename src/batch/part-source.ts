// One part of a batch: every so many tables of the whole, in their order; blank lines are no tables.
import type { Shard } from '../plan/plan.js';
import type { Chunk, UnitSource } from './chunk.js';

/** Lines of other parts are handed on blank, so that line numbers stay what they are. */
export function partOf(source: UnitSource, { index, of }: Shard): UnitSource {
  let tables = 0;
  const isOurs = (): boolean => tables++ % of === index - 1;
  return {
    async next(most): Promise<Chunk | null> {
      const chunk = await source.next(most);
      if (chunk === null) return null;
      switch (chunk.kind) {
        case 'lines':
          return { ...chunk, lines: chunk.lines.map((line) => (line.trim() === '' || isOurs() ? line : '')) };
        case 'objects':
          return chunk;
        case 'tables':
          return { ...chunk, tables: chunk.tables.filter(() => isOurs()) };
      }
    },
  };
}
