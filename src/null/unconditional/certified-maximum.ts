// The largest value of a polynomial with non-negative Bernstein coefficients on [0, 1], between two proven bounds. A polynomial
// never exceeds its largest coefficient on an interval and meets the first and last one at the ends; halving the interval (de
// Casteljau 1959) brings the two together quadratically. Every step is a mean of positive numbers, so that rounding stays
// relative: at most 2^-53 for each degree and halving.

export interface CertifiedMaximum {
  /** No value exceeds it, rounding included. */
  readonly upper: number;
  /** Attained at `at`, rounding included. */
  readonly lower: number;
  /** In [0, 1]: where the largest value seen lies. */
  readonly at: number;
}

interface Piece {
  readonly from: number;
  readonly width: number;
  readonly coefficients: Float64Array;
  readonly largest: number;
  readonly depth: number;
}

/** Bounds this near in relative terms are near enough. */
export const standardGap = 1e-11;
const mostHalvings = 20_000;
/** A coefficient below this share of the largest is raised to it: the maximum is at least largest / (degree + 1), so that
 *  nothing is seen of it, and no number is ever subnormal. */
const floorShare = 1e-30;

/**
 * @param coefficients Bernstein coefficients, all >= 0, at least one > 0; not changed.
 * @param relativeError of the coefficients.
 * Time: about 100 halvings of degree^2 / 2 means. The bounds hold whenever it ends.
 */
export function certifiedMaximum(
  coefficients: Float64Array,
  relativeError: number,
  gap = standardGap,
): CertifiedMaximum {
  const degree = coefficients.length - 1;
  const largest = greatest(coefficients);
  const raised = coefficients.map((c) => Math.max(c, largest * floorShare));
  let pieces: Piece[] = [{ from: 0, width: 1, coefficients: raised, largest, depth: 0 }];
  let best = 0;
  let at = 0;
  let deepest = 0;
  const look = (value: number, place: number): void => {
    if (value <= best) return;
    best = value;
    at = place;
  };
  look(raised[0]!, 0);
  look(raised[degree]!, 1);
  const isOpen = (piece: Piece): boolean => piece.largest > best * (1 + gap);
  for (let halvings = 0; halvings < mostHalvings; halvings++) {
    const top = highestOf(pieces);
    if (top < 0 || !isOpen(pieces[top]!)) break;
    const [left, right] = halves(pieces[top]!);
    look(right.coefficients[0]!, right.from);
    deepest = Math.max(deepest, left.depth);
    pieces.splice(top, 1, left, right);
    if (pieces.length > 100) pieces = pieces.filter(isOpen);
  }
  // What was dropped lies at most the gap above the best value.
  const upper = pieces.reduce((most, piece) => Math.max(most, piece.largest), best * (1 + gap));
  const error = 1.01 * ((degree + 2) * (deepest + 1) * 2 ** -53 + relativeError);
  return { upper: upper * (1 + error), lower: best * (1 - error), at };
}

/** True where no value of the polynomial exceeds the level, rounding included; false where one does, or it cannot be told. */
export function staysBelow(coefficients: Float64Array, level: number): boolean {
  const degree = coefficients.length - 1;
  const most = level * (1 - 1e-11 - degree * 40 * 2 ** -53);
  const floor = level * floorShare;
  const raised = coefficients.map((c) => Math.max(c, floor));
  const open: Piece[] = [{ from: 0, width: 1, coefficients: raised, largest: greatest(raised), depth: 0 }];
  for (let piece = open.pop(); piece !== undefined; piece = open.pop()) {
    if (piece.largest <= most) continue;
    if (piece.coefficients[0]! > most || piece.coefficients[degree]! > most || piece.depth > 30) return false;
    const [left, right] = halves(piece);
    if (right.coefficients[0]! > most) return false;
    open.push(left, right);
  }
  return true;
}

/** The same polynomial on [from, to] within [0, 1], from < to, as coefficients there. Relative error 6 degree 2^-53. */
export function onPart(coefficients: Float64Array, from: number, to: number): Float64Array {
  const below = to >= 1 ? coefficients : splitAt(coefficients, to)[0];
  return from <= 0 ? below : splitAt(below, from / to)[1];
}

function splitAt(coefficients: Float64Array, share: number): [Float64Array, Float64Array] {
  const right = coefficients.slice();
  const degree = right.length - 1;
  const left = new Float64Array(degree + 1);
  left[0] = right[0]!;
  for (let level = 1; level <= degree; level++) {
    for (let i = 0; i <= degree - level; i++) right[i] = right[i]! * (1 - share) + right[i + 1]! * share;
    left[level] = right[0]!;
  }
  return [left, right];
}

function halves({ from, width, coefficients, depth }: Piece): [Piece, Piece] {
  const right = coefficients.slice();
  const degree = right.length - 1;
  const left = new Float64Array(degree + 1);
  left[0] = right[0]!;
  for (let level = 1; level <= degree; level++) {
    let here = right[0]!;
    for (let i = 0; i <= degree - level; i++) {
      const next = right[i + 1]!;
      right[i] = (here + next) * 0.5;
      here = next;
    }
    left[level] = right[0]!;
  }
  const half = width / 2;
  return [
    { from, width: half, coefficients: left, largest: greatest(left), depth: depth + 1 },
    { from: from + half, width: half, coefficients: right, largest: greatest(right), depth: depth + 1 },
  ];
}

function greatest(values: Float64Array): number {
  let most = 0;
  for (const value of values) if (value > most) most = value;
  return most;
}

function highestOf(pieces: readonly Piece[]): number {
  let top = pieces.length - 1;
  for (let k = 0; k < pieces.length; k++) if (pieces[k]!.largest > pieces[top]!.largest) top = k;
  return top;
}
