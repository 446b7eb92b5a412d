// Exact McNemar: given how many pairs changed, each changed one way or the other like a fair coin (McNemar 1947; exact: the sign
// test). All tails of one walk along the binomial law.
import { WideSum } from '../numeric/wide-number.js';
import { cutFrom, type ExactAnswer, type Masses } from '../null/exact/exact-answer.js';
import type { ExactCut, OrderingName } from '../null/contract.js';
import { isNothingBeside, OutwardWalk } from './fair-coin.js';

/** Steps that the walk takes: from the middle to the observed count, and until nothing is left beyond it. */
export const mcnemarWork = (there: number, back: number): number =>
  Math.abs(there - back) / 2 + 10 * Math.sqrt(there + back) + 100;

/**
 * Cuts of `there` among there + back discordant pairs; upper means more of them went there. By `distance` from an even split,
 * which the law's symmetry makes the same as by probability. Relative error 4e-16 of the middle mass, and nothing to speak of beyond.
 */
export function exactMcNemar(there: number, back: number, names: readonly OrderingName[]): ExactAnswer {
  const m = there + back;
  const far = Math.max(there, back);
  const walk = new OutwardWalk(m);
  const inside = new WideSum();
  const add = (into: WideSum, times: number): void =>
    into.add(times * walk.mass.high, walk.exponent, times * walk.mass.low);
  // Away from an even split there are two such counts, one on either side.
  while (walk.x < far) {
    add(inside, 2 * walk.x === m ? 1 : 2);
    walk.step();
  }
  const point = new WideSum();
  add(point, 1);
  const beyond = new WideSum();
  const reached = walk.mass.value;
  const scale = walk.exponent;
  while (walk.step()) {
    add(beyond, 1);
    if (isNothingBeside(walk.mass.value * 2 ** Math.max(-1000, walk.exponent - scale), reached)) break;
  }
  const even = there === back;
  const side: Parts = { inside, point, beyond, even };
  const one = new WideSum();
  one.add(1, 0);
  return {
    cuts: names.map((name): ExactCut => cutFrom(name, { ...massesOf(name, there >= back, side), whole: one }, 1e-15)),
    point: point.over(one),
  };
}

interface Parts {
  readonly inside: WideSum;
  readonly point: WideSum;
  readonly beyond: WideSum;
  readonly even: boolean;
}

function massesOf(name: OrderingName, moreThere: boolean, side: Parts): Omit<Masses, 'whole'> {
  const { inside, point, beyond, even } = side;
  if (name === 'distance' || name === 'probability') {
    const twice = (mass: WideSum): WideSum => sumOf(mass, mass);
    return { below: inside, tied: even ? point : twice(point), above: twice(beyond) };
  }
  const most = even ? sumOf(beyond) : sumOf(beyond, inside, point);
  const out = { below: most, tied: point, above: beyond };
  return (name === 'upper') === moreThere || even ? out : { below: beyond, tied: point, above: most };
}

function sumOf(...parts: readonly WideSum[]): WideSum {
  const sum = new WideSum();
  for (const part of parts) sum.addSum(part);
  return sum;
}
