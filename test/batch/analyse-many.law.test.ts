// A table of a batch has the answer that it has alone, wherever it stands and whatever else is in the batch.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { analyseMany } from '../../src/batch/analyse-many.js';
import type { BatchLine, CompactLine, ErrorLine, FullLine } from '../../src/batch/lines.js';
import type { Result } from '../../src/result/result.js';
import type { TableParts } from '../../src/table/table.js';
import { checkedLine, isBatchLine } from '../helpers/checked-lines.js';
import { smallTable, twoByTwoTable } from '../helpers/tables.js';

const planOf = fc.oneof(
  fc.constant({}),
  fc.constant({ method: 'sample', draws: 300 } as const),
  fc.constant({ method: 'asymptotic' } as const),
  fc.constant({ statistic: 'trend', tail: 'upper' } as const),
  fc.constant({ statistic: 'likelihood-ratio', method: 'sample', draws: 'auto', mostDraws: 1000 } as const),
);
const line: fc.Arbitrary<BatchLine> = fc
  .tuple(fc.string({ maxLength: 6, unit: 'binary' }), fc.oneof(twoByTwoTable, smallTable), planOf)
  .map(([key, counts, plan]) => ({ key, counts, plan }));
const lines = fc.array(line, { minLength: 1, maxLength: 8 });

const settings = { seed: 'many', alpha: 0.01 };

type Answered = CompactLine | FullLine | ErrorLine;

async function all(tables: Iterable<BatchLine>, full = false): Promise<Answered[]> {
  const found: Answered[] = [];

  const many = full
    ? analyseMany(tables, settings, { full: true, threads: 1 })
    : analyseMany(tables, settings, { threads: 1 });
  for await (const one of many) found.push(checkedLine(one));
  return found;
}

/** Compact lines leave out what takes further questions to know. */
const plain = ({ pValues }: Result): Result['pValues'] =>
  pValues.map((p) => {
    const kept = { ...p };
    delete kept.leastAttainable;
    return kept;
  });

describe('a batch', () => {
  it('gives each table what analyse gives it alone, under its key', async () => {
    await fc.assert(
      fc.asyncProperty(lines, async (tables) => {
        const [compact, full] = [await all(tables), await all(tables, true)];
        for (const [k, { key, plan, ...parts }] of tables.entries()) {
          expect(isBatchLine(tables[k])).toBe(true);
          const alone = await analyse(parts as TableParts, { ...settings, ...(plan as object), tableKey: String(key) });
          expect(full[k]).toEqual({ key, ...alone });
          const { counts, notes, ...found } = compact[k] as CompactLine;
          expect(counts).toEqual(parts.counts);
          expect(found).toMatchObject({ key, statistic: alone.statistic, pValues: plain(alone) });
          expect(alone.notes).toEqual(expect.arrayContaining(notes));
        }
      }),
      { numRuns: 12 },
    );
  });

  it('gives compact lines that hold all it takes to find the same again', async () => {
    await fc.assert(
      fc.asyncProperty(lines, async (tables) => {
        for (const found of (await all(tables)) as CompactLine[]) {
          const { key, counts, plan, statistic, pValues, notes } = found;
          const again = await analyse({ counts }, { ...(plan as object), tableKey: key });
          expect({ statistic, pValues }).toEqual({ statistic: again.statistic, pValues: plain(again) });
          expect(again.notes).toEqual(expect.arrayContaining(notes));
        }
      }),
      { numRuns: 12 },
    );
  });

  it('changes no digit with the order of its tables, or with those that are left out', async () => {
    await fc.assert(
      fc.asyncProperty(
        lines.chain((tables) => fc.tuple(fc.constant(tables), fc.shuffledSubarray(tables))),
        async ([tables, some]) => {
          const before = new Map((await all(tables)).map((found, k) => [tables[k], found]));
          expect(await all(some)).toEqual(some.map((table) => before.get(table)));
        },
      ),
      { numRuns: 12 },
    );
  });
});
