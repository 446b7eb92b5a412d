// Random tables with the margins of a given one, for whoever simulates: the very tables that a sampled test with the same
// seed draws, in the same order.
import { blockSize } from './null/sampled/limits.js';
import { prepareSampler } from './null/sampled/sample-cuts.js';
import { blockStream } from './random/stream.js';
import { hasOneTableOnly, liveTable } from './table/live-table.js';
import type { Table } from './table/table.js';

export interface DrawOptions {
  /** How many, at least 1. */
  readonly number: number;
  readonly seed: string;
  /** Key of the table in a batch; part of what its streams are keyed by. Default: none. */
  readonly tableKey?: string;
}

/**
 * Tables from the law in which all margins are held (Fisher 1935); counts[row][column], empty lines in their places.
 * Same table margins, seed and key: same tables, on every machine.
 */
export function* drawTables(table: Table, { number, seed, tableKey = '' }: DrawOptions): Generator<number[][]> {
  const live = liveTable(table);
  const sampler = hasOneTableOnly(live) ? undefined : prepareSampler(live, []);
  const drawn = Float64Array.from(live.counts);
  for (let done = 0, block = 0; done < number; block++) {
    const stream = blockStream(seed, tableKey, block);
    const end = Math.min(number, done + blockSize);
    for (; done < end; done++) {
      sampler?.drawTable(stream, drawn);
      const counts = table.rowLabels.map(() => table.columnLabels.map(() => 0));
      live.rowIndex.forEach((row, i) => {
        live.columnIndex.forEach((column, j) => {
          counts[row]![column] = drawn[i * live.columns + j]!;
        });
      });
      yield counts;
    }
  }
}
