// The hypergeometric law: how many of `drawn` units, taken without replacement from `total` of which `marked` are marked,
// carry the mark. P(x) = C(marked, x) C(total - marked, drawn - x) / C(total, drawn).
// The samplers need it at the mode, and elsewhere relative to the mode. Relative error below 1e-8 up to a total of 2^53, so
// that no p can be off by a tenth of its standard error within 10^12 draws.
import { logFactorial } from '../../../numeric/log-factorial.js';
import { devianceTerm, stirlingError } from '../../../numeric/saddle-point.js';
import { logFactorialEntries } from '../limits.js';
import { exponentialOfNegative } from './exponential.js';

// Shared by all samplers of a process, because it depends on nothing; filled as far as the largest total seen.
let table = new Float64Array(0);

/** ln k! for 0 <= k <= min(largest, logFactorialEntries - 1). Absolute error below 2e-10. */
export function logFactorialsUpTo(largest: number): Float64Array {
  const length = Math.min(largest + 1, logFactorialEntries);
  if (table.length < length) {
    const longer = new Float64Array(Math.min(logFactorialEntries, Math.max(length, 2 * table.length)));
    longer.set(table);
    for (let k = table.length; k < longer.length; k++) longer[k] = logFactorial(k);
    table = longer;
  }
  return table;
}

export class HypergeometricMass {
  private readonly logs: Float64Array;

  /** @param largestTotal largest `total` that will be asked for. */
  constructor(largestTotal: number) {
    this.logs = logFactorialsUpTo(largestTotal);
  }

  /** P(x) for x in the support. */
  at(total: number, marked: number, drawn: number, x: number): number {
    const unmarked = total - marked;
    const left = total - drawn;
    const { logs } = this;
    if (total < logs.length) {
      return exponentialOfNegative(
        logs[marked]! +
          logs[unmarked]! +
          (logs[drawn]! + logs[left]!) -
          logs[total]! -
          (logs[x]! + logs[marked - x]! + (logs[drawn - x]! + logs[unmarked - drawn + x]!)),
      );
    }
    return Math.exp(
      fringe(marked) +
        fringe(unmarked) +
        fringe(drawn) +
        fringe(left) -
        fringe(total) -
        distance(total, marked, drawn, x),
    );
  }

  /** P(x) / P(mode) for x and mode in the support; 0 where it is below e^-60. */
  relativeTo(mode: number, total: number, marked: number, drawn: number, x: number): number {
    const { logs } = this;
    if (total < logs.length) {
      const rest = total - marked - drawn;
      return exponentialOfNegative(
        logs[mode]! +
          logs[marked - mode]! +
          (logs[drawn - mode]! + logs[rest + mode]!) -
          (logs[x]! + logs[marked - x]! + (logs[drawn - x]! + logs[rest + x]!)),
      );
    }
    return exponentialOfNegative(distance(total, marked, drawn, mode) - distance(total, marked, drawn, x));
  }
}

/** ln k! - (k ln k - k): what Stirling's leading terms leave out. 0 at 0. */
const fringe = (k: number): number => (k === 0 ? 0 : stirlingError(k) + 0.5 * Math.log(2 * Math.PI * k));

/**
 * The part of -ln P(x) that depends on x, in the saddle-point form (Loader 2000): deviances of the four cells from their
 * expectations, which are small near the mode however large the counts, so that differences of ln k! of 10^17 never arise.
 */
function distance(total: number, marked: number, drawn: number, x: number): number {
  const share = marked / total;
  const rest = (total - marked) / total;
  const left = total - drawn;
  return (
    cellDistance(x, drawn * share) +
    cellDistance(marked - x, left * share) +
    cellDistance(drawn - x, drawn * rest) +
    cellDistance(left - marked + x, left * rest)
  );
}

const cellDistance = (count: number, expected: number): number => devianceTerm(count, expected) + fringe(count);
