// Stuart's statistic when every pair is turned round or not by a fair coin, exactly: the law of the differences of the margins, pair of
// levels by pair of levels. What it tests is exchangeability: that the two answers of a pair could have been given the other way round.
import { WideSum } from '../numeric/wide-number.js';
import { cutFrom } from '../null/exact/exact-answer.js';
import type { ExactCut } from '../null/contract.js';
import { OutwardWalk } from './fair-coin.js';
import type { HomogeneityForm } from './homogeneity.js';
import { largestForDoubles } from './bowker-exact.js';
import type { DiscordantPair } from './square-table.js';

/** Entries of the array over differences; two of them are held. */
const mostStates = 4e6;

export interface StatesForecast {
  readonly possible: boolean;
  readonly workUnits: number;
}

/** The differences of all levels but the last, each from -reach to reach in steps of two, as one index. */
interface States {
  readonly strides: readonly number[];
  readonly sizes: readonly number[];
  readonly reach: readonly number[];
  readonly count: number;
}

function statesOf(levels: number, pairs: readonly DiscordantPair[]): States {
  const reach = new Array<number>(levels).fill(0);
  for (const { first, second, there, back } of pairs) {
    reach[first]! += there + back;
    reach[second]! += there + back;
  }
  // The level with the widest reach follows from the others.
  const sizes = reach.map((most) => most + 1);
  const widest = sizes.indexOf(Math.max(...sizes));
  const strides: number[] = [];
  let count = 1;
  sizes.forEach((size, level) => {
    strides.push(level === widest ? 0 : count);
    if (level !== widest) count *= size;
  });
  return { strides, sizes, reach, count };
}

export function forecastHomogeneity(form: HomogeneityForm, pairs: readonly DiscordantPair[]): StatesForecast {
  const { count } = statesOf(form.levels, pairs);
  const steps = pairs.reduce((sum, { there, back }) => sum + there + back + 1, 0);
  return { possible: count <= mostStates && form.value <= largestForDoubles, workUnits: count * steps + 100 };
}

/** The upper cut. Call only where the forecast says that it is possible. */
export function exactHomogeneity(form: HomogeneityForm, pairs: readonly DiscordantPair[]): ExactCut {
  const { strides, sizes, reach, count } = statesOf(form.levels, pairs);
  let law = new Float64Array(count);
  // The index of a level counts the pairs that went from it; x of m from the one, the others from the other.
  law[0] = 1;
  for (const { first, second, there, back } of pairs) {
    const m = there + back;
    const stride = strides[first]! - strides[second]!;
    const from = strides[second]! * m;
    const chances = coinChances(m);
    const next = new Float64Array(count);
    for (let state = 0; state < count; state++) {
      const mass = law[state]!;
      if (mass === 0) continue;
      for (let x = 0; x <= m; x++) next[state + from + x * stride]! += mass * chances[x]!;
    }
    law = next;
  }
  const masses = [new WideSum(), new WideSum(), new WideSum()] as const;
  const differences = new Float64Array(form.levels);
  for (let state = 0; state < count; state++) {
    if (law[state] === 0) continue;
    let sum = 0;
    for (let level = 0; level < form.levels; level++) {
      if (strides[level] === 0) continue;
      const index = Math.floor(state / strides[level]!) % sizes[level]!;
      differences[level] = 2 * index - reach[level]!;
      sum += differences[level]!;
    }
    const last = strides.indexOf(0);
    differences[last] = -sum;
    masses[form.place(differences) + 1]!.add(law[state]!, 0);
  }
  const [below, tied, above] = masses;
  const whole = new WideSum();
  whole.add(1, 0);
  const roundings = pairs.reduce((sum, { there, back }) => sum + Math.min(there + back, 64) + 4, 0);
  return cutFrom('upper', { below, tied, above, whole }, roundings * 2 ** -53);
}

/** P(X = x) for x = 0, ..., m. */
function coinChances(m: number): Float64Array {
  const chances = new Float64Array(m + 1);
  const walk = new OutwardWalk(m);
  do {
    const mass = walk.mass.value * 2 ** Math.max(-1070, walk.exponent);
    chances[walk.x] = mass;
    chances[m - walk.x] = mass;
  } while (walk.step());
  return chances;
}
