// Gathers what a run found into the one reported shape, in the order of its fields, and gives it its words.
import type { CellEntry } from '../cell/cell-entries.js';
import type { Effect } from '../effect/contract.js';
import type { ReadTable } from '../input/read-table.js';
import type { DesignLine } from '../design/panel.js';
import type { NamedRoles } from '../plan/roles.js';
import type { Plan } from '../plan/plan.js';
import type { PValueEntry } from '../pvalue/contract.js';
import type { Table } from '../table/table.js';
import type { ExpectationCheck } from '../table/expectation-check.js';
import type { ResultBeforeWords } from './describe.js';
import { methodsFor } from './methods.js';
import type { Fragility, InputEcho, Note, NullSummary, Result } from './result.js';
import { sentenceFor } from './sentence.js';
import { version } from './version.js';

export interface Findings {
  readonly read: ReadTable;
  readonly plan: Plan;
  /** Roles where the statistic itself compares two groups. */
  readonly named: NamedRoles | null;
  /** null where the margins leave the statistic undefined. */
  readonly value: number | null;
  /** Why it is undefined; default: a group is empty. */
  readonly undefinedBecause?: NonNullable<Result['statistic']['reason']> | undefined;
  readonly degreesOfFreedom: number | undefined;
  readonly pValues: readonly PValueEntry[];
  readonly expectations: ExpectationCheck;
  /** Tables with these margins, when every one was counted. */
  readonly tables: number | undefined;
  readonly byOrder?: { readonly order: NonNullable<Result['order']>; readonly effects: readonly Effect[] } | undefined;
  readonly effects?: readonly Effect[] | undefined;
  readonly cells?: readonly CellEntry[] | undefined;
  readonly fragility?: Fragility | undefined;
  readonly strata?: Result['strata'];
  readonly clusters?: Result['clusters'];
  readonly comparisons?: Result['comparisons'] | undefined;
  /** What p would be under other designs; for a 2x2 table. */
  readonly designs?: readonly DesignLine[] | undefined;
  readonly quasi?: NonNullable<Result['quasiIndependence']> | undefined;
  readonly nullSummary?: NullSummary | undefined;
  readonly notes: readonly Note[];
}

export function buildResult(found: Findings): Result {
  const before = beforeWords(found);
  const { notes, ...parts } = before;
  return { ...parts, sentence: sentenceFor(before), methods: methodsFor(before), notes };
}

/** All of a result but its sentences. */
export function beforeWords(found: Findings): ResultBeforeWords {
  const { plan, read } = found;
  return {
    schema: 'keepsum/result/1',
    tool: { name: 'keepsum', version },
    input: inputEcho(read),
    plan,
    statistic: statisticEcho(found),
    pValues: [...found.pValues],
    ...(found.designs === undefined ? {} : { designs: [...found.designs] }),
    diagnostics: {
      ...found.expectations,
      ...(found.tables === undefined ? {} : { tables: found.tables }),
    },
    ...(found.nullSummary === undefined ? {} : { nullSummary: found.nullSummary }),
    ...effectParts(found),
    ...(found.byOrder === undefined ? {} : { order: found.byOrder.order }),
    ...(found.fragility === undefined ? {} : { fragility: found.fragility }),
    ...(found.quasi === undefined ? {} : { quasiIndependence: found.quasi }),
    ...(found.cells === undefined ? {} : { cells: [...found.cells] }),
    ...(found.strata === undefined ? {} : { strata: found.strata }),
    ...(found.clusters === undefined ? {} : { clusters: found.clusters }),
    ...(found.comparisons === undefined ? {} : { comparisons: found.comparisons }),
    notes: [...found.notes],
  };
}

/** The statistic with its value and the groups that it compares. */
export const statisticEcho = (found: Pick<Findings, 'read' | 'named' | FoundStatistic>): Result['statistic'] => ({
  ...statisticFound(found),
  ...(found.named === null ? {} : groupsCompared(found.read.table, found.named)),
});

type FoundStatistic = 'plan' | 'value' | 'degreesOfFreedom' | 'undefinedBecause';

/** The statistic with its value. */
export const statisticFound = ({
  plan,
  value,
  degreesOfFreedom,
  undefinedBecause = 'empty-group',
}: Pick<Findings, FoundStatistic>): Result['statistic'] => ({
  name: plan.statistic,
  value: value === null ? null : extended(value),
  ...(value === null ? { reason: undefinedBecause } : {}),
  ...(degreesOfFreedom === undefined ? {} : { degreesOfFreedom }),
});

/** Those of any table, then those that use a declared order. */
function effectParts({ effects = [], byOrder }: Findings): Pick<Result, 'effects'> {
  const all = [...effects, ...(byOrder?.effects ?? [])];
  return all.length === 0 ? {} : { effects: effectsFound(all) };
}

const effectsFound = (effects: readonly Effect[]): NonNullable<Result['effects']> =>
  effects.map((effect) => ({ ...effect, intervals: [...effect.intervals] }));

function inputEcho({ table, source, sha256, missing, levels }: ReadTable): InputEcho {
  return {
    source: {
      ...source,
      ...(source.totalsLeftOut ? { totalsLeftOut: [...source.totalsLeftOut] } : {}),
    } as InputEcho['source'],
    sha256,
    rowLabels: [...table.rowLabels],
    columnLabels: [...table.columnLabels],
    counts: table.counts.map((row) => [...row]),
    ...(table.impossible === undefined ? {} : { impossible: table.impossible.map((row) => [...row]) }),
    total: table.total,
    rowTotals: [...table.rowTotals],
    columnTotals: [...table.columnTotals],
    emptyRows: table.rowLabels.filter((_, i) => table.rowTotals[i] === 0),
    emptyColumns: table.columnLabels.filter((_, j) => table.columnTotals[j] === 0),
    missing,
    ...(levels === undefined ? {} : { levels: levelsEcho(levels) }),
  };
}

const levelsEcho = ({ changes, leftOut }: NonNullable<ReadTable['levels']>): NonNullable<InputEcho['levels']> => ({
  changes: changes.map((change) => ({ ...change, labels: [...change.labels] })),
  leftOut,
});

const extended = (value: number): number | 'infinity' | '-infinity' =>
  value === Infinity ? 'infinity' : value === -Infinity ? '-infinity' : value;

/** The two proportions, first minus second, as the roles name them; one group only when the other is missing. */
function groupsCompared(table: Table, named: NamedRoles): Pick<Result['statistic'], 'groups' | 'event'> {
  if (named.referenceLabel === null) return { event: named.eventLabel };
  const byRows = named.groups === 'rows';
  const groupLabels = byRows ? table.rowLabels : table.columnLabels;
  const eventLine = (byRows ? table.columnLabels : table.rowLabels).indexOf(named.eventLabel);
  const group = (label: string): NonNullable<Result['statistic']['groups']>[number] => {
    const line = groupLabels.indexOf(label);
    const events = byRows ? table.counts[line]![eventLine]! : table.counts[eventLine]![line]!;
    const size = byRows ? table.rowTotals[line]! : table.columnTotals[line]!;
    return { label, events, size, proportion: size === 0 ? null : events / size };
  };
  return { groups: [group(named.firstLabel), group(named.referenceLabel)], event: named.eventLabel };
}
