// The answer where a 2x2 table is tested against a stated value other than none: its own p-values stand alone, since what else is
// said of a table (cells, approximations, other designs) asks about none.
import type { Answer } from './analyse.js';
import { nullValueEntries, statedScore } from './design/null-value-entries.js';
import type { ReadTable } from './input/read-table.js';
import type { Prepared } from './plan/make-plan.js';
import { questionsOf } from './pvalue/p-values.js';
import { nearTiesNote, onlyOneTable } from './result/notes.js';
import type { LiveTable } from './table/live-table.js';

export function statedAnswer(read: ReadTable, live: LiveTable, prepared: Prepared): Answer {
  const { plan, bound } = prepared;
  const isOdds = plan.nullValue!.of === 'odds-ratio';
  const pValues = nullValueEntries(questionsOf(plan), read.table, plan);
  return {
    read,
    live,
    prepared,
    value: isOdds
      ? bound === null
        ? prepared.valueOfOnlyTable
        : bound.value(live.counts)
      : statedScore(read.table, plan, pValues),
    degreesOfFreedom: undefined,
    pValues,
    tables: undefined,
    cells: undefined,
    notes: [...read.notes, ...(isOdds ? (bound === null ? [onlyOneTable] : []) : [nearTiesNote])],
  };
}
