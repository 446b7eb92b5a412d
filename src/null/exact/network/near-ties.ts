// Level values that are not yet proof of a tie: the tables behind them are found again by walking back through the lists
// (values are whole numbers, so a path is followed by equality), put in classes by an exact key, and one table of each
// class is compared exactly with the observed one. No tolerance is involved and no list carries more than its values.
import type { CellSum, Place } from '../../../statistic/contract.js';
import { perNearTie } from './costs.js';
import { exponentRule } from './encoding.js';
import type { Half } from './half.js';
import type { Level } from './level.js';
import type { Network } from './network.js';
import { primesUpTo } from './prime-exponents.js';
import { Transitions } from './transitions.js';

/** Partial tables with the same exact key: their weight, and one of them as counts by column. */
interface PartialClass {
  readonly key: bigint | null;
  /** The encoding's own key, 0 when it has none. */
  readonly code: number;
  weight: number;
  readonly counts: readonly (readonly [column: number, counts: readonly number[]])[];
}

/** An entry of the first half and one of the second that are level together. */
export interface NearPair {
  /** The entry's value and key before `column`, or complete when that is null. */
  readonly value: number;
  readonly key: number;
  /** Counts of the first half's last column, where the entry was made without it. */
  readonly column: readonly number[] | null;
  /** Row sums of the complete first half. */
  readonly sums: ArrayLike<number>;
  readonly otherValue: number;
  readonly otherKey: number;
  readonly otherSums: ArrayLike<number>;
}

/** Weights of the pairs on each side (without the first half's last column when that is given apart). */
export interface NearMasses {
  readonly low: number;
  readonly tied: number;
  readonly high: number;
}

export class NearTies {
  private readonly cellKey: ((count: number) => bigint) | null;
  private readonly verdicts = new Map<bigint, Place>();
  private remembered = new Map<string, PartialClass[]>();
  /** Working space by depth. */
  private readonly transitions: Transitions[] = [];

  constructor(
    private readonly network: Network,
    private readonly cells: CellSum,
    statistic: string,
  ) {
    this.cellKey = exactKey(network, statistic);
  }

  decide(first: Half, second: Half, pair: NearPair): NearMasses {
    this.network.meter.spend(perNearTie);
    const parts: PartialClass[] = [];
    let before: readonly number[] = Array.from(pair.sums);
    if (pair.column !== null) {
      const { column } = pair;
      before = before.map((sum, i) => sum - column[i]!);
      parts.push(this.single(first.columns.at(-1)!, column, 1));
    }
    const classes = this.classes(first, first.columns.length - parts.length, before, pair.value);
    const others = this.classes(second, second.columns.length, Array.from(pair.otherSums), pair.otherValue);
    const masses = { low: 0, tied: 0, high: 0 };
    for (const a of classes) {
      if (a.code !== pair.key) continue;
      for (const b of others) {
        if (b.code !== pair.otherKey) continue;
        const place = this.place([a, b, ...parts]);
        masses[place === 0 ? 'tied' : place < 0 ? 'low' : 'high'] += a.weight * b.weight;
      }
    }
    return masses;
  }

  private place(parts: readonly PartialClass[]): Place {
    const key = parts.reduce<bigint | null>(
      (sum, part) => (sum === null || part.key === null ? null : sum + part.key),
      0n,
    );
    const known = key === null ? undefined : this.verdicts.get(key);
    if (known !== undefined) return known;
    const counts: (readonly number[])[] = [];
    for (const part of parts) for (const [column, cells] of part.counts) counts[column] = cells;
    const place = this.cells.decide(this.network.table.liveCounts(counts));
    if (key !== null) this.verdicts.set(key, place);
    return place;
  }

  private single(column: number, counts: readonly number[], weight: number): PartialClass {
    const { cellKey } = this;
    const { keys } = this.network.columns[column]!;
    return {
      key: cellKey === null ? null : counts.reduce((sum, n) => sum + cellKey(n), 0n),
      code: keys === null ? 0 : counts.reduce((sum, n, i) => sum + keys[i]![n]!, 0),
      weight,
      counts: [[column, counts]],
    };
  }

  /** The partial tables after `depth` columns with these row sums and this value, in classes. */
  private classes(half: Half, depth: number, sums: readonly number[], value: number): PartialClass[] {
    if (depth === 0)
      return value === 0 ? [{ key: this.cellKey === null ? null : 0n, code: 0, weight: 1, counts: [] }] : [];
    const name = `${half.columns.join()}/${depth}/${sums.join()}/${value}`;
    const known = this.remembered.get(name);
    if (known !== undefined) return known;
    const { network } = this;
    const column = half.columns[depth - 1]!;
    const from = half.levels[depth - 1]!;
    const transitions = (this.transitions[depth] ??= new Transitions(network.space));
    transitions.collect(from, network.columns[column]!, sums, value);
    const found: PartialClass[] = [];
    const byKey = new Map<bigint, PartialClass>();
    for (let t = 0; t < transitions.length; t++) {
      const wanted = value - transitions.values[t]!;
      if (!holds(from, transitions.sources[t]!, wanted)) continue;
      const counts = transitions.countsAt(t, from, network.columns[column]!, sums);
      const last = this.single(column, counts, transitions.weights[t]!);
      const before = sums.map((sum, i) => sum - counts[i]!);
      for (const part of this.classes(half, depth - 1, before, wanted)) {
        const key = part.key === null || last.key === null ? null : part.key + last.key;
        const weight = part.weight * last.weight;
        const same = key === null ? undefined : byKey.get(key);
        if (same !== undefined) {
          same.weight += weight;
          continue;
        }
        const made: PartialClass = {
          key,
          code: part.code + last.code,
          weight,
          counts: [...part.counts, ...last.counts],
        };
        found.push(made);
        if (key !== null) byKey.set(key, made);
      }
    }
    if (this.remembered.size > 100_000) this.remembered = new Map();
    this.remembered.set(name, found);
    return found;
  }
}

/** Whether the node's list has an entry of exactly this value. */
function holds(level: Level, node: number, value: number): boolean {
  let low = level.starts[node]!;
  let high = level.starts[node + 1]!;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (level.values[middle]! < value) low = middle + 1;
    else high = middle;
  }
  return low < level.starts[node + 1]! && level.values[low] === value;
}

/** Up to here exponents of primes make short keys; beyond, the multiset of counts stands in (equal multisets tie). */
const largestFactored = 120;
const largestKeyed = 5000;

/** A key that adds up over cells and is equal only for tables that tie; null when the statistic or the counts have none. */
function exactKey(network: Network, statistic: string): ((count: number) => bigint) | null {
  const rule = exponentRule(statistic);
  if (rule === null) return null;
  const { rowTotals, columnTotals } = network.table;
  const limit = Math.min(rowTotals.at(-1)!, Math.max(...columnTotals));
  if (limit > largestKeyed) return null;
  // How often each count occurs, 16 bits apart.
  if (limit > largestFactored) return (count) => 1n << BigInt(16 * count);
  const keys = new Array<bigint>(limit + 1).fill(0n);
  primesUpTo(limit).forEach((prime, place) => {
    const shift = BigInt(48 * place);
    rule.exponents(prime, limit).forEach((exponent, n) => (keys[n]! += BigInt(exponent) << shift));
  });
  return (count) => keys[count]!;
}
