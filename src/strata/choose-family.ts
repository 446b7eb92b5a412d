// Tables by stratum and wishes -> the family that answers them, for the strata and for the pooled table as one stratum.
import type { PlanOptions } from '../plan/plan.js';
import type { noRoles, NamedRoles } from '../plan/roles.js';
import { strataScoresOf, type ShownScores } from '../plan/strata-plan.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import type { StrataFamily } from './family.js';
import { generalFamily } from './general-family.js';
import { layersOf, transposed, type StrataScores } from './general/layers.js';
import type { GeneralName } from './general/problem.js';
import { cornerScores, oddsFamily } from './odds-family.js';
import { stratumOf, type Stratum } from './odds/stratum.js';

type Counts = readonly (readonly number[])[];

export interface Chosen {
  readonly family: StrataFamily;
  /** The same question asked of the pooled table, as one stratum. */
  readonly pooled: StrataFamily;
  /** Scores as the plan shows them; null for statistics without. */
  readonly shown: { readonly rows: ShownScores; readonly columns: ShownScores } | null;
}

/** @param roles for the common odds ratio: who is compared, and what counts as the event */
export function chooseFamily(
  name: string,
  table: Table,
  live: LiveTable,
  strata: readonly Counts[],
  roles: NamedRoles | null,
  options: PlanOptions,
): Chosen {
  if (roles !== null) {
    const family = (tables: readonly Counts[]): StrataFamily => {
      const cornerLines = roles.groups === 'rows' ? [roles.first, roles.event] : [roles.event, roles.first];
      const scores = {
        rows: onLiveLines(cornerScores(cornerLines[0]!, 2), live.rowIndex, table.rowTotals.length),
        columns: onLiveLines(cornerScores(cornerLines[1]!, 2), live.columnIndex, table.columnTotals.length),
      };
      return oddsFamily(twoByTwos(tables, live, roles), layersOf(table, tables, scores));
    };
    return { family: family(strata), pooled: family([table.counts]), shown: null };
  }
  const rows = strataScoresOf(options.rowScores, table.rowTotals, '--row-scores');
  const columns = strataScoresOf(options.columnScores, table.columnTotals, '--column-scores');
  const turned = name === 'mean-scores' && options.groups === 'columns';
  const family = (tables: readonly Counts[]): StrataFamily => {
    const sides = { rowTotals: table.rowTotals, columnTotals: table.columnTotals };
    const layers = turned
      ? layersOf({ rowTotals: sides.columnTotals, columnTotals: sides.rowTotals }, tables.map(transposed), {
          rows: columns.exact,
          columns: rows.exact,
        })
      : layersOf(sides, tables, { rows: rows.exact, columns: columns.exact });
    const [height, width] = turned ? [live.columns, live.rows] : [live.rows, live.columns];
    return generalFamily(name as GeneralName, layers, height, width);
  };
  const scored = name === 'mean-scores' || name === 'score-correlation';
  return {
    family: family(strata),
    pooled: family([table.counts]),
    shown: scored ? { rows: rows.shown, columns: columns.shown } : null,
  };
}

/** The strata over the live lines, first group and event in the corner. */
export const twoByTwos = (tables: readonly Counts[], live: LiveTable, roles: NamedRoles | typeof noRoles): Stratum[] =>
  tables.map((counts) =>
    stratumOf(
      live.rowIndex.map((row) => live.columnIndex.map((column) => counts[row]![column]!)),
      roles,
    ),
  );

function onLiveLines(scores: ReturnType<typeof cornerScores>, live: readonly number[], length: number): StrataScores {
  const zero = { numerator: 0n, denominator: 1n };
  return Array.from({ length }, (_, line) => scores[live.indexOf(line)] ?? zero);
}
