// Takes two lists of counts and leaves what tells them apart: counts that stand in both are struck out of both.
// For quantities that depend on the counts as an unordered list only (products over cells of n! or n^n).

export interface Apart {
  /** Sorted downwards; both of the same length. */
  readonly ours: number[];
  readonly theirs: number[];
}

export function countsApart(counts: ArrayLike<number>, others: ArrayLike<number>): Apart {
  const a = Array.from(counts).sort((x, y) => y - x);
  const b = Array.from(others).sort((x, y) => y - x);
  const ours: number[] = [];
  const theirs: number[] = [];
  let i = 0;
  let j = 0;
  while (i < a.length || j < b.length) {
    if (i < a.length && j < b.length && a[i] === b[j]) {
      i++;
      j++;
    } else if (j >= b.length || (i < a.length && a[i]! > b[j]!)) ours.push(a[i++]!);
    else theirs.push(b[j++]!);
  }
  return { ours, theirs };
}
