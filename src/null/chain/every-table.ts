// Every table with given margins and impossible cells, where they are few: the exact law, and the oracle of the chain.
import { exponentOf, WideSum } from '../../numeric/wide-number.js';
import type { Place } from '../../statistic/contract.js';
import type { FreeCells } from '../../table/free-cells.js';
import type { Table } from '../../table/table.js';
import { cutFrom, type ExactAnswer } from '../exact/exact-answer.js';

/** Calls `visit` with each table, row-major; false when more than `mostSteps` cells had to be set. The array is reused. */
export function visitTables(
  table: Table,
  { blocks }: FreeCells,
  mostSteps: number,
  visit: (counts: Float64Array) => void,
): boolean {
  const width = table.columnLabels.length;
  const cells = blocks.flatMap((block) => block.cells).sort((a, b) => a - b);
  const counts = new Float64Array(table.rowLabels.length * width);
  const rowLeft = Float64Array.from(table.rowTotals);
  const columnLeft = Float64Array.from(table.columnTotals);
  const lastInRow = new Map(cells.map((cell) => [Math.floor(cell / width), cell]));
  const lastInColumn = new Map(cells.map((cell) => [cell % width, cell]));
  let steps = 0;
  const set = (at: number): boolean => {
    if (at === cells.length) {
      visit(counts);
      return true;
    }
    const cell = cells[at]!;
    const [row, column] = [Math.floor(cell / width), cell % width];
    const most = Math.min(rowLeft[row]!, columnLeft[column]!);
    const endsRow = lastInRow.get(row) === cell;
    const endsColumn = lastInColumn.get(column) === cell;
    const least = Math.max(endsRow ? rowLeft[row]! : 0, endsColumn ? columnLeft[column]! : 0);
    for (let count = least; count <= (endsRow || endsColumn ? Math.min(least, most) : most); count++) {
      if (++steps > mostSteps) return false;
      counts[cell] = count;
      rowLeft[row]! -= count;
      columnLeft[column]! -= count;
      const within = set(at + 1);
      rowLeft[row]! += count;
      columnLeft[column]! += count;
      if (!within) return false;
    }
    counts[cell] = 0;
    return true;
  };
  return set(0);
}

/** Undefined where listing them takes more than `mostSteps` cells. */
export function exactByListing(
  table: Table,
  free: FreeCells,
  mostSteps: number,
  place: (counts: Float64Array) => Place,
): (ExactAnswer & { readonly tables: number }) | undefined {
  const observed = Float64Array.from(table.counts.flat());
  const cells = free.blocks.flatMap((block) => block.cells);
  const factors = new Map(cells.map((cell) => [cell, new FactorialRatio(observed[cell]!)]));
  const masses = [new WideSum(), new WideSum(), new WideSum()] as const;
  const whole = new WideSum();
  let tables = 0;
  const within = visitTables(table, free, mostSteps, (counts) => {
    let mantissa = 1;
    let exponent = 0;
    for (const cell of cells) {
      const [m, e] = factors.get(cell)!.at(counts[cell]!);
      mantissa *= m;
      exponent += e;
    }
    tables++;
    whole.add(mantissa, exponent);
    masses[place(counts) + 1]!.add(mantissa, exponent);
  });
  if (!within) return undefined;
  const [below, tied, above] = masses;
  const point = new WideSum();
  point.add(1, 0);
  return { cuts: [cutFrom('upper', { below, tied, above, whole }, 1e-13)], point: point.over(whole), tables };
}

/** n! of the observed count over n! of another, as mantissa in [1, 2) and exponent; remembered. */
class FactorialRatio {
  private readonly known = new Map<number, readonly [number, number]>();

  constructor(private readonly from: number) {
    this.known.set(from, [1, 0]);
  }

  at(count: number): readonly [number, number] {
    const found = this.known.get(count);
    if (found !== undefined) return found;
    const [m, e] = this.at(count > this.from ? count - 1 : count + 1);
    const value = count > this.from ? m / count : m * (count + 1);
    const shift = exponentOf(value);
    const made = [value * 2 ** -shift, e + shift] as const;
    this.known.set(count, made);
    return made;
  }
}
