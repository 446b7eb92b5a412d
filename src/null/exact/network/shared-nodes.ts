// How many nodes share a list on average, where one list serves every arrangement of a node's row sums: as many as there are
// arrangements that are worth a list themselves. With equal rows those are nearly all; with lopsided ones, few, since a node
// lies near its expected sums and its arrangements do not. Counted over points spread evenly in the ball of nodes, with a fixed seed.
import { blockStream, type UniformSource } from '../../../random/stream.js';
import type { OrientedTable } from './oriented-table.js';

const points = 12;
/** All arrangements of up to five rows; of more, so many picked at random. */
const arrangements = 240;

/**
 * @param size units in the columns so far
 * @param radiusSquared chi-square distance from expectation within which nodes are worth a list
 * @returns at least 1, at most the factorial of the number of rows
 */
export function nodesToAList({ rows, rowTotals, total }: OrientedTable, size: number, radiusSquared: number): number {
  const expected = rowTotals.map((rowTotal) => (rowTotal / total) * size);
  const spread = expected.map((mean) => mean * (1 - size / total));
  if (size <= 0 || size >= total) return 1;
  const random = blockStream('nodes', '', 0);
  const orders = ordersOf(rows, random);
  let ways = 1;
  for (let i = 2; i <= rows; i++) ways *= i;
  let shares = 0;
  for (let point = 0; point < points; point++) {
    const sums = nodeInBall(expected, spread, radiusSquared, random);
    const bound = Math.max(radiusSquared, distance(sums, expected, spread, null, Infinity));
    let near = 0;
    for (const order of orders) if (distance(sums, expected, spread, order, bound) <= bound) near++;
    const different = (ways * near) / orders.length / repeats(sums);
    shares += 1 / Math.max(1, different);
  }
  return points / shares;
}

function nodeInBall(
  expected: readonly number[],
  spread: readonly number[],
  radiusSquared: number,
  random: UniformSource,
): number[] {
  const size = expected.reduce((sum, mean) => sum + mean, 0);
  const gauss = expected.map(
    () => Math.sqrt(-2 * Math.log(1 - random.uniform())) * Math.cos(2 * Math.PI * random.uniform()),
  );
  // The sums add up: without the part along the square roots of the means.
  const along = gauss.reduce((sum, z, i) => sum + z * Math.sqrt(expected[i]! / size), 0);
  const flat = gauss.map((z, i) => z - along * Math.sqrt(expected[i]! / size));
  const length = Math.sqrt(flat.reduce((sum, z) => sum + z * z, 0)) || 1;
  const radius = Math.sqrt(radiusSquared) * random.uniform() ** (1 / (expected.length - 1));
  return flat.map((z, i) => Math.max(0, Math.round(expected[i]! + (z / length) * radius * Math.sqrt(spread[i]!))));
}

function distance(
  sums: readonly number[],
  expected: readonly number[],
  spread: readonly number[],
  order: readonly number[] | null,
  enough: number,
): number {
  let total = 0;
  for (let i = 0; i < sums.length && total <= enough; i++) {
    const difference = sums[order === null ? i : order[i]!]! - expected[i]!;
    total += (difference * difference) / spread[i]!;
  }
  return total;
}

/** Arrangements that look alike, because some of the sums are equal. */
function repeats(sums: readonly number[]): number {
  let ways = 1;
  const seen = new Map<number, number>();
  for (const sum of sums) {
    const times = (seen.get(sum) ?? 0) + 1;
    seen.set(sum, times);
    ways *= times;
  }
  return ways;
}

function ordersOf(rows: number, random: UniformSource): number[][] {
  const first = Array.from({ length: rows }, (_, i) => i);
  let orders: number[][] = [[]];
  if (rows <= 5) {
    for (let i = 0; i < rows; i++)
      orders = orders.flatMap((order) => first.filter((j) => !order.includes(j)).map((j) => [...order, j]));
    return orders;
  }
  return Array.from({ length: arrangements }, () => {
    const order = [...first];
    for (let i = rows - 1; i > 0; i--) {
      const j = Math.floor(random.uniform() * (i + 1));
      [order[i], order[j]] = [order[j]!, order[i]!];
    }
    return order;
  });
}
