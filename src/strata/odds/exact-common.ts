// The exact conditional test of a common odds ratio of 1 in a 2x2xK table: S, the sum of corner counts, against its law given every
// margin (Cornfield 1956; Gart 1970; Mehta, Patel & Gray 1985).
import { WideSum } from '../../numeric/wide-number.js';
import type { ExactCut, OrderingName } from '../../null/contract.js';
import { cutFrom } from '../../null/exact/exact-answer.js';
import { lessExtreme, modeOf, type Split } from './orderings.js';
import type { SumLaw } from './sum-law.js';

/** Stated bound on the relative error of every mass: 90 bits are carried, the quotient is rounded once. */
const relativeError = 1e-14;

export const commonCuts = (law: SumLaw, observed: number, orderings: readonly OrderingName[]): ExactCut[] =>
  orderings.map((name) => cutFor(law, name, lessExtreme(law, observed, name)));

function cutFor(law: SumLaw, name: OrderingName, { from, to, ties }: Split): ExactCut {
  const whole = new WideSum();
  whole.add(1, 0);
  const tied = new WideSum();
  for (const value of ties) tied.addSum(law.mass(value, value, 1));
  const lowEdge = ties.includes(from - 1) ? from - 2 : from - 1;
  const highEdge = ties.includes(to + 1) ? to + 2 : to + 1;
  const above = new WideSum();
  above.addSum(tail(law, lowEdge, -1));
  above.addSum(tail(law, highEdge, 1));
  return cutFrom(name, { below: between(law, from, to), tied, above, whole }, relativeError);
}

/** P(S >= s) or P(S <= s): one beyond the mode is added from its end nearest the mode, one that holds it as a whole. */
function tail(law: SumLaw, s: number, towards: 1 | -1): WideSum {
  const mode = modeOf(law);
  const holdsMode = towards > 0 ? s <= mode : s >= mode;
  return towards > 0 ? law.mass(s, law.highest, holdsMode ? 0 : 1) : law.mass(law.lowest, s, holdsMode ? 0 : -1);
}

function between(law: SumLaw, from: number, to: number): WideSum {
  if (from > to) return new WideSum();
  const mode = modeOf(law);
  return law.mass(from, to, to < mode ? -1 : from > mode ? 1 : 0);
}
