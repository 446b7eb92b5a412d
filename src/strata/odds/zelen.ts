// Zelen (1971): is the odds ratio the same in all strata? Given every margin and also S, the sum of the corners, no unknown is left:
// p adds up the sets of tables no more probable than the observed set. Strata are fixed one by one; branches whose every end is known
// to be rarer (or none) are added whole (or left), by bounds on what the strata still open can do.
import type { ExactCut } from '../../null/contract.js';
import { cutFrom } from '../../null/exact/exact-answer.js';
import { WideSum } from '../../numeric/wide-number.js';
import { waysOf } from './corner-counts.js';
import { ScaledNumber } from './scaled-number.js';
import { highestCorner, lowestCorner, type Stratum } from './stratum.js';

/** Branches that may be looked at, and steps that the bounds may take: under a second in all. */
const mostBranches = 3e6;
const mostBoundSteps = 5e6;

interface Level {
  readonly lowest: number;
  /** ln of weight(k) / weight(observed corner), for each possible corner; exactly 0 where the weights are equal. */
  readonly logs: Float64Array;
  readonly weights: Float64Array;
  /** Of this stratum and all after it, by their sum from `restLowest`: largest and least sum of logs, and the mass. */
  readonly restLowest: number;
  readonly most: Float64Array;
  readonly least: Float64Array;
  readonly mass: Float64Array;
}

/** @param psi an odds ratio under which the observed sum is common: it cancels, and keeps the masses in range. @returns null where it would take too long. */
export function zelenCut(strata: readonly Stratum[], psi: number): ExactCut | null {
  // Strata of few tables last: the bounds on them are sharp, and the branches many.
  const ordered = [...strata].sort((x, y) => width(y) - width(x));
  if (boundSteps(ordered) > mostBoundSteps) return null;
  const levels = levelsFor(ordered, psi);
  const slack = levels.reduce((sum, { logs }) => sum + logs.reduce((most, x) => Math.max(most, doubtOf(x)), 0), 0);
  const sums = { below: new WideSum(), tied: new WideSum(), above: new WideSum(), whole: new WideSum() };
  const corners = ordered.map(({ a }) => a);
  const observed = ordered.reduce((sum, { a }) => sum + a, 0);
  const decide = exactDecision(ordered);
  let branches = 0;

  const visit = (level: number, left: number, log: number, mass: number): boolean => {
    if (++branches > mostBranches) return false;
    const here = levels[level];
    if (here === undefined) {
      const place = log > slack ? 1 : log < -slack ? -1 : slack === 0 ? 0 : decide(corners);
      (place > 0 ? sums.below : place < 0 ? sums.above : sums.tied).add(mass, 0);
      return true;
    }
    const at = left - here.restLowest;
    const [most, least] = [log + here.most[at]!, log + here.least[at]!];
    const side =
      most < -slack
        ? sums.above
        : least > slack
          ? sums.below
          : slack === 0 && most === 0 && least === 0
            ? sums.tied
            : null;
    if (side !== null) {
      side.add(mass * here.mass[at]!, 0);
      return true;
    }
    const rest = levels[level + 1];
    for (let i = 0; i < here.logs.length; i++) {
      const k = here.lowest + i;
      const after = left - k;
      if (rest === undefined ? after !== 0 : after < rest.restLowest || after - rest.restLowest >= rest.mass.length)
        continue;
      corners[level] = k;
      if (!visit(level + 1, after, log + here.logs[i]!, mass * here.weights[i]!)) return false;
    }
    return true;
  };

  if (!visit(0, observed, 0, 1)) return null;
  sums.whole.add(levels[0]!.mass[observed - levels[0]!.restLowest]!, 0);
  return cutFrom('probability', sums, 1e-12);
}

const width = (one: Stratum): number => highestCorner(one) - lowestCorner(one);

function boundSteps(strata: readonly Stratum[]): number {
  let steps = 0;
  let length = 1;
  for (const one of [...strata].reverse()) {
    steps += length * (width(one) + 1);
    length += width(one);
  }
  return steps;
}

/** What rounding can do to one logarithm; nothing to that of 1. */
const doubtOf = (log: number): number => (log === 0 ? 0 : 2 ** -50 * (1 + Math.abs(log)));

function levelsFor(strata: readonly Stratum[], psi: number): Level[] {
  const levels: Level[] = [];
  let rest = { lowest: 0, most: Float64Array.of(0), least: Float64Array.of(0), mass: Float64Array.of(1) };
  for (let s = strata.length - 1; s >= 0; s--) {
    const lowest = lowestCorner(strata[s]!);
    const logs = logRatios(strata[s]!);
    const weights = logs.map((log, i) => Math.exp(log + Math.log(psi) * (lowest + i - strata[s]!.a)));
    const total = weights.reduce((sum, weight) => sum + weight, 0);
    weights.forEach((weight, i) => (weights[i] = weight / total));
    const length = rest.mass.length + logs.length - 1;
    const most = new Float64Array(length).fill(-Infinity);
    const least = new Float64Array(length).fill(Infinity);
    const mass = new Float64Array(length);
    logs.forEach((log, i) => {
      for (let j = 0; j < rest.mass.length; j++) {
        most[i + j] = Math.max(most[i + j]!, log + rest.most[j]!);
        least[i + j] = Math.min(least[i + j]!, log + rest.least[j]!);
        mass[i + j]! += weights[i]! * rest.mass[j]!;
      }
    });
    rest = { lowest: rest.lowest + lowest, most, least, mass };
    levels.unshift({ lowest, logs, weights, restLowest: rest.lowest, most, least, mass });
  }
  return levels;
}

/** Walked from the observed corner, so that equal weights give exactly 0. */
function logRatios(stratum: Stratum): Float64Array {
  const { a, first, second, events } = stratum;
  const [lowest, highest] = [lowestCorner(stratum), highestCorner(stratum)];
  const logs = new Float64Array(highest - lowest + 1);
  const logOf = (ratio: ScaledNumber): number => (ratio.exponent === 0 ? Math.log(ratio.high) : ratio.log2 * Math.LN2);
  for (let k = a, ratio = new ScaledNumber(); k < highest; k++) {
    ratio
      .times(first - k)
      .times(events - k)
      .over(k + 1)
      .over(second - events + k + 1);
    logs[k + 1 - lowest] = logOf(ratio);
  }
  for (let k = a, ratio = new ScaledNumber(); k > lowest; k--) {
    ratio
      .times(k)
      .times(second - events + k)
      .over(first - k + 1)
      .over(events - k + 1);
    logs[k - 1 - lowest] = logOf(ratio);
  }
  return logs;
}

/** Sign of ln P(tables) - ln P(observed), from products of whole numbers. */
function exactDecision(strata: readonly Stratum[]): (corners: readonly number[]) => number {
  let ways: bigint[][] | undefined;
  let target = 1n;
  return (corners) => {
    if (ways === undefined) {
      ways = strata.map(waysOf);
      target = strata.reduce((all, one, s) => all * ways![s]![one.a - lowestCorner(one)]!, 1n);
    }
    const product = strata.reduce((all, one, s) => all * ways![s]![corners[s]! - lowestCorner(one)]!, 1n);
    return product > target ? 1 : product < target ? -1 : 0;
  };
}
