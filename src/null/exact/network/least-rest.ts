// What the rows from some row on must at least add to a column's value, by how many units are left for them: the search for
// ways to set a column turns back where that is too much already.

/**
 * [row][amount], for row 0 to the number of rows; Infinity where the rows cannot hold so many. A lower bound whatever the
 * cell values are (each row's replaced by its lower convex hull, whose increments are merged in rising order), and the least
 * itself where they are convex in the count; short of it by the rounding of one addition a unit at most.
 * @param values of the column, [row][count]
 */
export function leastRest(values: readonly Float64Array[], total: number): Float64Array[] {
  const rests: Float64Array[] = [];
  let after = new Float64Array(total + 1).fill(Infinity);
  after[0] = 0;
  rests.unshift(after);
  let room = 0;
  for (const cells of [...values].reverse()) {
    const hull = lowerHull(cells);
    const most = hull.length - 1;
    const rest = new Float64Array(total + 1).fill(Infinity);
    const reach = Math.min(total, room + most);
    rest[0] = after[0]! + hull[0]!;
    for (let amount = 1, here = 0; amount <= reach; amount++) {
      const there = amount - 1 - here;
      const byHere = here < most ? hull[here + 1]! - hull[here]! : Infinity;
      const byThere = there < room ? after[there + 1]! - after[there]! : Infinity;
      if (byHere <= byThere) here++;
      rest[amount] = after[amount - here]! + hull[here]!;
    }
    room = reach;
    after = rest;
    rests.unshift(rest);
  }
  return rests;
}

/** The largest convex function that is nowhere above the given one. */
function lowerHull(values: Float64Array): Float64Array {
  const corners: number[] = [];
  for (let n = 0; n < values.length; n++) {
    while (corners.length > 1) {
      const [a, b] = [corners.at(-2)!, corners.at(-1)!];
      if ((values[b]! - values[a]!) * (n - b) < (values[n]! - values[b]!) * (b - a)) break;
      corners.pop();
    }
    corners.push(n);
  }
  const hull = Float64Array.from(values);
  for (let c = 1; c < corners.length; c++) {
    const [a, b] = [corners[c - 1]!, corners[c]!];
    const slope = (values[b]! - values[a]!) / (b - a);
    for (let n = a + 1; n < b; n++) hull[n] = values[a]! + slope * (n - a);
  }
  return hull;
}
