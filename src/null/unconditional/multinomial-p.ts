// The unconditional exact p of a 2x2 table of which only the total was fixed (Barnard 1947): the largest probability, over the
// proportions of the first row and of the first column, of the tables at least as extreme by the score.
// Its Bernstein coefficients are the conditional probabilities of the set given the margins (r, c).
import { certifiedMaximumOnSquare } from './certified-maximum-on-square.js';
import { groupLaw, lawError } from './group-law.js';
import type { Direction } from './by-statistic.js';

export interface MultinomialP {
  readonly p: number;
  readonly log10: number;
  readonly relativeError: number;
  readonly nuisance: {
    /** Proportions of the first row and the first column at which the largest probability was seen. */
    readonly value: readonly [number, number];
    readonly certifiedUpper: number;
  };
}

const nearTie = 1e-12;
const gap = 1e-9;
/** Most boxes halved. */
const mostHalvings = 6000;

/** @param cells of the whole 2x2 table, row by row; the first one is the corner whose excess is `upper`. */
export function multinomialP(cells: readonly [number, number, number, number], direction: Direction): MultinomialP {
  const [a, b, c, d] = cells;
  const total = a + b + c + d;
  const coefficients = conditionalMasses(total, a, a + b, a + c, direction);
  const { upper, lower, at } = certifiedMaximumOnSquare(coefficients, total, lawError(total, total), {
    gap,
    halvings: mostHalvings,
    isSymmetric: direction === 'distance',
  });
  const bound = Math.min(1, upper);
  return {
    p: bound,
    log10: Math.min(0, Math.log10(upper)),
    relativeError: upper >= 1 ? Math.max(0, 1 - lower) : upper / lower - 1,
    nuisance: { value: at, certifiedUpper: bound },
  };
}

/** P(at least as extreme | r, c) for all margins; T rises with the corner count, so that borders cut each law. */
function conditionalMasses(total: number, a: number, row: number, column: number, direction: Direction): Float64Array {
  const size = total + 1;
  const masses = new Float64Array(size * size);
  const sign = direction === 'lower' ? -1 : 1;
  const folded = direction === 'distance';
  const isExtreme = scoreAtLeast(total, [a, row, column], sign, folded);
  for (let r = 0; r <= total; r++) {
    for (let c = 0; c <= total; c++) {
      const { lowest, highest, weights, whole } = groupLaw(r, total - r, c);
      let inside = 0;
      let outside = 0;
      for (let x = lowest; x <= highest; x++) {
        if (isExtreme(x, r, c)) inside += weights[x - lowest]!;
        else outside++;
      }
      masses[r * size + c] = outside === 0 ? 1 : inside / whole;
    }
  }
  return masses;
}

type Margins = readonly [corner: number, row: number, column: number];

/** T = (a n - r c) / sqrt(r (n - r) c (n - c)) against the observed one; 0 where a margin is empty. Ties count, exactly. */
function scoreAtLeast(
  total: number,
  observed: Margins,
  sign: number,
  folded: boolean,
): (x: number, r: number, c: number) => boolean {
  const whole = ([x, r, c]: Margins): { top: bigint; bottom: bigint } => {
    const [n, big] = [BigInt(total), [x, r, c].map(BigInt) as [bigint, bigint, bigint]];
    const d = (big[0] * n - big[1] * big[2]) * BigInt(sign);
    const bottom = big[1] * (n - big[1]) * big[2] * (n - big[2]);
    return { top: d < 0n && !folded ? -d * d : d * d, bottom: bottom === 0n ? 1n : bottom };
  };
  const value = (x: number, r: number, c: number): number => {
    const d = (x * total - r * c) * sign;
    if (d === 0) return 0;
    const square = (d * d) / (r * (total - r) * c * (total - c));
    return d < 0 && !folded ? -square : square;
  };
  const target = value(...observed);
  const exact = whole(observed);
  return (x, r, c) => {
    const apart = value(x, r, c) - target;
    if (Math.abs(apart) > nearTie * Math.abs(target)) return apart > 0;
    const { top, bottom } = whole([x, r, c]);
    return top * exact.bottom >= exact.top * bottom;
  };
}
