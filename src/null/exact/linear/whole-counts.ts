// The law of a linear statistic in whole numbers: how many arrangements of the units give each value. Slow; it decides the
// few cases in which two values of nearly equal probability are neither mirror images nor told apart by doubles.
import type { ScoredSides } from './scored-sides.js';

/** Arrangements (of row labels over the units) by value of S; over n! / prod R! they are the probabilities. */
export function wholeCounts({ rows, columns, total }: ScoredSides): Map<number, bigint> {
  interface Node {
    readonly left: readonly number[];
    readonly ways: Map<number, bigint>;
  }
  let nodes: Node[] = [{ left: rows.map((row) => row.total), ways: new Map([[0, 1n]]) }];
  let rest = total;
  for (const column of columns) {
    rest -= column.total;
    for (let row = 0; row < rows.length; row++) {
      const next = new Map<string, Node>();
      for (const { left, ways } of nodes) {
        const drawn = left.reduce((sum, x) => sum + x, 0) - rest;
        const others = left.slice(row + 1).reduce((sum, x) => sum + x, 0);
        for (let k = Math.max(0, drawn - others); k <= Math.min(left[row]!, drawn); k++) {
          const after = left.with(row, left[row]! - k);
          const key = after.join();
          let node = next.get(key);
          if (node === undefined) next.set(key, (node = { left: after, ways: new Map() }));
          const factor = binomial(drawn, k);
          const shift = column.score * rows[row]!.score * k;
          for (const [sum, count] of ways) {
            node.ways.set(sum + shift, (node.ways.get(sum + shift) ?? 0n) + count * factor);
          }
        }
      }
      nodes = [...next.values()];
    }
  }
  return nodes[0]!.ways;
}

const known = new Map<string, bigint>();

function binomial(n: number, k: number): bigint {
  const fewer = Math.min(k, n - k);
  const key = `${n},${fewer}`;
  const found = known.get(key);
  if (found !== undefined) return found;
  let result = 1n;
  for (let i = 1; i <= fewer; i++) result = (result * BigInt(n - fewer + i)) / BigInt(i);
  if (known.size > 50_000) known.clear();
  known.set(key, result);
  return result;
}
