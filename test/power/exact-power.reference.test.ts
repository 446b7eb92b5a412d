// Power of the conditional exact test against base R 4.2.2: sums of dbinom x dbinom over the outcomes that fisher.test
// (two-sided by probability) rejects.
import { describe, expect, it } from 'vitest';
import { decimalRational } from '../../src/numeric/rational.js';
import type { PowerRule, PowerTail } from '../../src/power/design.js';
import { exactPower } from '../../src/power/exact-power.js';

const answers: readonly [number, number, number, number, string, PowerTail, PowerRule | null, number][] = [
  [20, 20, 0.7, 0.4, '0.05', 'both', 'probability', 0.347488714795777],
  [20, 20, 0.7, 0.4, '0.05', 'upper', null, 0.463006385815918],
  [15, 30, 0.1, 0.5, '0.01', 'both', 'probability', 0.523303533453088],
  [12, 9, 0.9, 0.3, '0.05', 'both', 'probability', 0.826363794221256],
];

describe('power of the conditional exact test equals base R', () => {
  it.each(answers)(
    '%d and %d units, %d against %d, alpha %s, %s %s',
    (first, second, p1, p2, alpha, tail, rule, power) => {
      const testing = { test: 'conditional', order: 'score', tail, rule, alpha: decimalRational(alpha)! } as const;
      expect(exactPower({ first, second }, [p1, p2], testing).power).toBeCloseTo(power, 12);
    },
  );
});
