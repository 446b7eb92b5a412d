// One part of a batch: every so many tables of the whole, in their order; blank lines are no tables.
import { createHash } from 'node:crypto';
import type { Shard } from '../plan/plan.js';
import { textOf, type Chunk, type UnitSource } from './chunk.js';

export interface PartSource extends UnitSource {
  /** What was read so far of the whole input: its tables, and the SHA-256 of its units. */
  whole(): { readonly tables: number; readonly input: string };
}

/** Lines of other parts are handed on blank, so that line numbers stay what they are. */
export function partOf(source: UnitSource, { index, of }: Shard): PartSource {
  const hash = createHash('sha256');
  let tables = 0;
  const isOurs = (): boolean => tables++ % of === index - 1;
  return {
    async next(most): Promise<Chunk | null> {
      const chunk = await source.next(most);
      if (chunk === null) return null;
      hash.update(textOf(chunk));
      switch (chunk.kind) {
        case 'lines':
          return { ...chunk, lines: chunk.lines.map((line) => (line.trim() === '' || isOurs() ? line : '')) };
        case 'objects':
          return chunk; // a program picks its tables itself
        case 'tables':
          return { ...chunk, tables: chunk.tables.filter(() => isOurs()) };
      }
    },
    whole: () => ({ tables, input: hash.copy().digest('hex') }),
  };
}
