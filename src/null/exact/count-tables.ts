// How many tables have given margins: counted where that is quick, else estimated. Feeds the forecast of exact work.
import { logFactorial } from '../../numeric/log-factorial.js';
import type { LiveTable } from '../../table/live-table.js';

export interface TableCount {
  readonly tables: number;
  /** False when the number is the normal approximation of Gail & Mantel (1977). */
  readonly counted: boolean;
}

const transitionLimit = 8_000;
/** Estimates beyond this are not worth an attempt to count: nobody lists so many, and the attempt would fail. */
const mostToCount = 1e10;

/** Deterministic, from the margins alone. */
export function countTables(live: LiveTable): TableCount {
  const [few, many] =
    live.rows <= live.columns ? [live.rowTotals, live.columnTotals] : [live.columnTotals, live.rowTotals];
  const estimate = approximateCount(few, many);
  const counted =
    few.length === 2 ? countTwoLines(few[0]!, many) : estimate > mostToCount ? undefined : countByLines(few, many);
  return counted === undefined ? { tables: estimate, counted: false } : { tables: counted, counted: true };
}

/** Ways to split one line's total over cells that hold at most `capacities`: one running sum a cell. */
function countTwoLines(total: number, capacities: Float64Array): number | undefined {
  if (capacities.length === 2) {
    const all = capacities[0]! + capacities[1]!;
    return Math.min(total, capacities[0]!) - Math.max(0, total - (all - capacities[0]!)) + 1;
  }
  if ((total + 1) * capacities.length > 50 * transitionLimit) return undefined;
  let ways = new Float64Array(total + 1);
  ways[0] = 1;
  for (const capacity of capacities) {
    const next = new Float64Array(total + 1);
    let window = 0;
    for (let k = 0; k <= total; k++) {
      window += ways[k]!;
      if (k > capacity) window -= ways[k - capacity - 1]!;
      next[k] = window;
    }
    ways = next;
  }
  // Above 2^53 the differences above lose units: still right to many digits, but no longer a count.
  return ways[total]! > Number.MAX_SAFE_INTEGER ? undefined : ways[total]!;
}

/** One line of the many at a time; what is left of the few, sorted, is the state, and equal states are merged. */
function countByLines(few: Float64Array, many: Float64Array): number | undefined {
  let states = new Map<string, { left: number[]; ways: number }>([['', { left: sorted(few), ways: 1 }]]);
  let transitions = 0;
  for (const total of sorted(many).slice(0, -1)) {
    const next = new Map<string, { left: number[]; ways: number }>();
    for (const { left, ways } of states.values()) {
      const room = suffixSums(left);
      const place = (line: number, rest: number, after: number[]): boolean => {
        if (line === left.length) {
          if (++transitions > transitionLimit) return false;
          const key = sorted(after);
          const name = key.join();
          const known = next.get(name);
          if (known === undefined) next.set(name, { left: key, ways });
          else known.ways += ways;
          return true;
        }
        for (let n = Math.max(0, rest - room[line + 1]!); n <= Math.min(rest, left[line]!); n++) {
          if (!place(line + 1, rest - n, [...after, left[line]! - n])) return false;
        }
        return true;
      };
      if (!place(0, total, [])) return undefined;
    }
    states = next;
  }
  let sum = 0;
  for (const { ways } of states.values()) sum += ways;
  return sum;
}

const sorted = (values: ArrayLike<number>): number[] => Array.from(values).sort((a, b) => a - b);

function suffixSums(values: readonly number[]): number[] {
  const sums = new Array<number>(values.length + 1).fill(0);
  for (let k = values.length - 1; k >= 0; k--) sums[k] = sums[k + 1]! + values[k]!;
  return sums;
}

/**
 * Gail & Mantel (1977): if every line of `lines` is split at random over the k totals, all splits alike, the sums are
 * nearly normal; count = prod C(R + k - 1, k - 1) x that normal density at the totals.
 */
function approximateCount(lines: Float64Array, totals: Float64Array): number {
  const k = totals.length;
  let logWays = 0;
  let variance = 0;
  let all = 0;
  for (const line of lines) {
    logWays += logFactorial(line + k - 1) - logFactorial(k - 1) - logFactorial(line);
    variance += (line * (line + k)) / (k * (k + 1));
    all += line;
  }
  let distance = 0;
  for (const total of totals) distance += (total - all / k) ** 2;
  const log =
    logWays + 0.5 * Math.log(k) - ((k - 1) / 2) * Math.log(2 * Math.PI * variance) - distance / (2 * variance);
  return Math.max(1, Math.exp(Math.min(700, log)));
}
