// Results to families, families to adjusted lines in the order of the results.
import { adjusted, adjustments, discreteAdjustments, type Adjustment } from './family/adjust.js';
import type { AdjustedLine } from './result/adjusted-declaration.js';
import type { FailedTest, FoundTest } from './family/read-results.js';

export interface Adjusted {
  readonly lines: readonly AdjustedLine[];
  /** How many tests count in each family, and which failed; sentences. */
  readonly remarks: readonly string[];
}

export interface AdjustWishes {
  readonly methods: readonly Adjustment[];
  readonly alpha: number;
}

/** Those that need nothing beyond the p-values. */
export const standardAdjustments: readonly Adjustment[] = adjustments.filter(
  (one) => !discreteAdjustments.includes(one),
);

/**
 * Failed tests are named and left out: they gave no p, and counting them would only raise the others. One that is unknown to reach
 * anything (no least attainable p) is taken to reach everything.
 */
export function adjustResults(
  results: readonly (FoundTest | FailedTest)[],
  { methods, alpha }: AdjustWishes,
): Adjusted {
  const found = results.filter((one): one is FoundTest => !('code' in one));
  const failed = results.filter((one): one is FailedTest => 'code' in one);
  const families = new Map<string, FoundTest[]>();
  for (const test of found) {
    const members = families.get(test.family) ?? [];
    members.push(test);
    families.set(test.family, members);
  }
  const values = new Map<FoundTest, Partial<Record<Adjustment, number | null>>>();
  for (const members of families.values()) {
    const family = members.map(({ p, leastAttainable }) => ({ p: p ?? 0, leastAttainable: leastAttainable ?? 0 }));
    for (const method of methods) {
      adjusted(family, method, alpha).forEach((value, k) => {
        values.set(members[k]!, { ...values.get(members[k]!), [method]: value });
      });
    }
  }
  return {
    lines: found.map((test) => ({
      key: test.key,
      family: test.family,
      tests: families.get(test.family)!.length,
      p: test.p,
      leastAttainable: test.leastAttainable,
      adjusted: values.get(test)!,
    })),
    remarks: [
      ...[...families].map(
        ([name, members]) => `family ${name}: ${members.length} test${members.length === 1 ? ' counts' : 's count'}`,
      ),
      ...(failed.length === 0
        ? []
        : [
            `left out because they failed: ${failed
              .slice(0, 20)
              .map(({ key, code }) => `${key} (${code})`)
              .join(', ')}${failed.length > 20 ? `, and ${failed.length - 20} more` : ''}`,
          ]),
      ...unknownReach(found, methods),
    ],
  };
}

function unknownReach(found: readonly FoundTest[], methods: readonly Adjustment[]): string[] {
  const unknown = found.filter(({ leastAttainable }) => leastAttainable === null).length;
  if (unknown === 0 || !methods.some((method) => discreteAdjustments.includes(method))) return [];
  return [`${unknown} of ${found.length} results do not say which p they could attain; these were taken to reach any`];
}
