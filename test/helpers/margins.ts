// Margins of a given total and unevenness, and a table that has them.

/** Totals that rise evenly, the largest about 1 + tilt times the smallest. */
export function spreadTotals(total: number, parts: number, tilt: number): number[] {
  const shares = Array.from({ length: parts }, (_, k) => 1 + tilt * (k / Math.max(1, parts - 1)));
  const sum = shares.reduce((a, b) => a + b);
  const counts = shares.map((share) => Math.floor((share / sum) * total));
  counts[parts - 1]! += total - counts.reduce((a, b) => a + b);
  return counts;
}

/** A table with those margins, by the north-west corner rule. */
export function cornerTable(rowTotals: readonly number[], columnTotals: readonly number[]): number[][] {
  const left = [...columnTotals];
  return rowTotals.map((total) => {
    let rest = total;
    return left.map((room, j) => {
      const n = Math.min(rest, room);
      rest -= n;
      left[j] = room - n;
      return n;
    });
  });
}
