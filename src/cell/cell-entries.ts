// One entry for each cell of the whole table, empty lines too, in the fields of the result's declaration.
import type { Mass } from '../null/contract.js';
import { smallestDouble } from '../pvalue/contract.js';
import { hasOneTableOnly, type LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import type { AdjustedError, AdjustedP } from './adjusted-p.js';
import type { CellReason } from './cell-reasons.js';
import { cellPError, cellPs } from './cell-p.js';
import { cellMeasures } from './residuals.js';
import type { Thresholds } from './thresholds.js';

export interface CellEntry {
  row: string;
  column: string;
  count: number;
  expected: number;
  contribution: number;
  pearsonResidual: number | null;
  adjustedResidual: number | null;
  /** Exact; null beside a reason. */
  p: number | null;
  log10P: number | null;
  reason?: CellReason;
  adjustedP: number | null;
  adjustedReason?: CellReason;
  /** How adjustedP was found. */
  method: 'exact' | 'sample' | null;
  /** Of adjustedP. */
  errors: AdjustedError[];
}

type Adjust = (thresholds: Thresholds) => Promise<AdjustedP[]>;

/** @param thresholds null where p is not adjusted beyond a 2x2 table, whose four cells share one p */
export async function cellEntries(
  table: Table,
  live: LiveTable,
  exponent: number,
  hasP: boolean,
  thresholds: Thresholds | null,
  adjust: Adjust,
): Promise<CellEntry[]> {
  const ps = hasP ? cellPs(live) : null;
  const adjusted = thresholds === null ? null : await adjust(thresholds);
  const isTwoByTwo = live.rows === 2 && live.columns === 2;
  return table.rowLabels.flatMap((row, i) =>
    table.columnLabels.map((column, j): CellEntry => {
      const names = { row, column, count: table.counts[i]![j]! };
      const [liveRow, liveColumn] = [live.rowIndex.indexOf(i), live.columnIndex.indexOf(j)];
      if (liveRow < 0 || liveColumn < 0) return { ...names, expected: 0, contribution: 0, ...none('empty-line') };
      const cell = liveRow * live.columns + liveColumn;
      const measures = cellMeasures(live, cell, exponent);
      if (hasOneTableOnly(live)) {
        return { ...names, ...none('only-one-table'), ...measures, adjustedResidual: null };
      }
      if (ps === null) return { ...names, ...none('over-bound'), ...measures };
      const p = ps[cell]!;
      const own = ownP(p);
      if (isTwoByTwo) return { ...names, ...measures, ...own, ...shared(p) };
      const found = adjusted === null ? undefined : adjusted[thresholds!.ofCell[cell]!];
      return { ...names, ...measures, ...own, ...adjustedParts(found, p) };
    }),
  );
}

function none(reason: CellReason): Omit<CellEntry, 'row' | 'column' | 'count' | 'expected' | 'contribution'> {
  return {
    pearsonResidual: null,
    adjustedResidual: null,
    p: null,
    log10P: null,
    reason,
    adjustedP: null,
    adjustedReason: reason,
    method: null,
    errors: [],
  };
}

const ownP = ({ value, log10 }: Mass): Pick<CellEntry, 'p' | 'log10P' | 'reason'> =>
  value < smallestDouble ? { p: null, log10P: log10, reason: 'underflow' } : { p: value, log10P: log10 };

/** The four cells of a 2x2 table lie equally far out: the smallest p is that of each. */
const shared = ({ value }: Mass): Pick<CellEntry, 'adjustedP' | 'adjustedReason' | 'method' | 'errors'> =>
  value < smallestDouble
    ? { adjustedP: null, adjustedReason: 'underflow', method: 'exact', errors: [] }
    : { adjustedP: value, method: 'exact', errors: [{ kind: 'rounding', relative: cellPError }] };

/** Never below the p itself, whatever rounding or drawing says. */
function adjustedParts(
  found: AdjustedP | undefined,
  own: Mass,
): Pick<CellEntry, 'adjustedP' | 'adjustedReason' | 'method' | 'errors'> {
  if (found === undefined) return { adjustedP: null, adjustedReason: 'over-bound', method: null, errors: [] };
  const { p, reason, method, error } = found;
  if (p === null) return { adjustedP: null, adjustedReason: reason ?? 'over-bound', method, errors: [] };
  return { adjustedP: Math.max(p, own.value), method, errors: error === undefined ? [] : [error] };
}
