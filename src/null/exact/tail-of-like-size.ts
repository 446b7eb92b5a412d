// In the law of the corner of a 2x2 table: the count above the mean whose upper tail is about as heavy as a lower one. In plain
// doubles, so a first guess only; it saves the exact search the walks over the law that it would take from farther off.
import { downRatio, logLaw, type CornerLaw } from './two-by-two-law.js';

/** Terms below e^-42 of the one looked for cannot move the guess. */
const negligible = 42;

/** About the least k > a with P(K >= k) <= P(K <= a), for a below the mean. Time: a few standard deviations of the law. */
export function countWithTailLike(law: CornerLaw, a: number): number {
  const { highest, lowest, middle } = law;
  const logObserved = logLaw(law, a);
  let goal = 1;
  for (let k = a, term = 1; k > lowest && term > 1e-17 * goal; k--) goal += term *= downRatio(law, k);
  // From so far out that what lies beyond adds nothing, inward until the sum is as large.
  let near = Math.max(a, middle);
  let far = highest;
  while (near < far) {
    const half = near + Math.floor((far - near) / 2);
    if (logLaw(law, half) < logObserved - negligible) far = half;
    else near = half + 1;
  }
  let term = Math.exp(logLaw(law, far) - logObserved);
  let sum = term;
  let k = far;
  for (; k > a + 1 && sum <= goal; k--) sum += term *= downRatio(law, k);
  return sum > goal ? k + 1 : k;
}
