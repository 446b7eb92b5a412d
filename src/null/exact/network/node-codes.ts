// Numbers for nodes that are sums of one code per row, so that a source is found by additions alone. Rows that may be
// exchanged share their codes, chosen so that the sum over them gives away which counts they hold but not in what order:
//   by tally        (b + 1)^(x - 1) for count x > 0: the digits of the sum tell how often each count occurs;
//   by power sums   x + B1 x^2 + B1 B2 x^3 + ...: b power sums determine b numbers (Newton's identities).
// Whichever needs less room is taken; where neither fits 53 bits there are no codes.

export interface NodeCodes {
  /** [row][count] */
  readonly codes: readonly Float64Array[];
  /** One more than the largest number. */
  readonly size: number;
}

const largestNumber = 2 ** 53;

/** @param blocks [from, to) of interchangeable rows. */
export function nodeCodes(
  rowTotals: readonly number[],
  blocks: readonly (readonly [number, number])[],
): NodeCodes | null {
  const { length } = rowTotals;
  const codes: Float64Array[] = [];
  const blockAt = new Map(blocks.map((block) => [block[0], block]));
  let place = 1;
  for (let row = 0; row < length;) {
    const block = blockAt.get(row);
    const to = block === undefined ? row + 1 : block[1];
    const longest = rowTotals[to - 1]!;
    // The sum of all rows is known at every level, so that the last row needs no code of its own.
    const last = to === length;
    const { code, size } = block === undefined ? plainCode(longest, last) : sharedCode(longest, to - row, last);
    if (place * size > largestNumber) return null;
    for (; row < to; row++) {
      codes.push(Float64Array.from({ length: rowTotals[row]! + 1 }, (_, count) => place * code(count)));
    }
    place *= size;
  }
  return { codes, size: place };
}

interface Code {
  readonly code: (count: number) => number;
  /** One more than the largest sum over the rows. */
  readonly size: number;
}

const plainCode = (longest: number, last: boolean): Code =>
  last ? { code: () => 0, size: 1 } : { code: (count) => count, size: longest + 1 };

function sharedCode(longest: number, rows: number, last: boolean): Code {
  const tally: Code = {
    code: (count) => (count === 0 ? 0 : (rows + 1) ** (count - 1)),
    size: (rows + 1) ** longest,
  };
  const steps: number[] = [];
  let size = 1;
  for (let power = last ? 2 : 1; power <= rows; power++) {
    steps.push(size);
    size *= rows * longest ** power + 1;
  }
  const first = last ? 2 : 1;
  const powerSums: Code = {
    code: (count) => steps.reduce((sum, step, at) => sum + step * count ** (first + at), 0),
    size,
  };
  return tally.size < powerSums.size ? tally : powerSums;
}
