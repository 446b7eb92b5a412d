// Wishes for a planned study to one checked plan: every default filled, every contradiction refused.
import { decimalRational } from '../numeric/rational.js';
import { oneOf, share, unused, wholeNumber } from '../plan/settings.js';
import { usageProblem } from '../problem/problem.js';
import { statisticNamed } from '../statistic/registry.js';
import {
  powerOrders,
  twoGroupTests,
  type PowerOrder,
  type PowerRule,
  type PowerTail,
  type TwoGroupTest,
  type TwoGroupTesting,
} from './design.js';
import type { PlannedGroup } from './read-groups.js';

/** What a user may say. Either `sizes` (one list for each answer), `totals`, or `power` to search for sizes. */
export interface PowerWishes {
  readonly groups: readonly PlannedGroup[];
  readonly sizes?: readonly (readonly number[])[];
  readonly totals?: readonly number[];
  readonly power?: number;
  /** Second group over first, for the search. Default 1. */
  readonly ratio?: number;
  /** Largest first group that the search looks at. Default 500. */
  readonly largest?: number;
  readonly test?: TwoGroupTest;
  readonly order?: PowerOrder;
  readonly tail?: PowerTail;
  readonly twoSidedRule?: PowerRule;
  readonly alpha?: number;
  /** Simulation. */
  readonly statistic?: string;
  readonly method?: 'auto' | 'exact' | 'sample' | 'asymptotic';
  /** Tables to simulate. Default 1,000. */
  readonly tables?: number;
  /** Draws for each table whose p is sampled. Default 1,000. */
  readonly draws?: number;
  readonly effort?: number;
  readonly seed?: string;
}

export interface SettledPower {
  readonly groups: readonly PlannedGroup[];
  readonly method: 'exact' | 'simulation';
  readonly fixed: 'rows' | 'total';
  /** Group sizes, or one total, for each answer. */
  readonly sizes: readonly (readonly number[])[];
  readonly wanted: number | undefined;
  readonly ratio: number;
  readonly largest: number;
  readonly testing: TwoGroupTesting;
  readonly tailGiven: boolean;
  readonly alpha: number;
  readonly statistic: string;
  readonly pMethod: 'auto' | 'exact' | 'sample' | 'asymptotic';
  readonly tables: number;
  readonly draws: number;
  readonly effort: number;
  readonly seed: string | undefined;
}

/** Exact work for one simulated table: some ten milliseconds. */
const standardTableEffort = 3e5;
const largestExact = 2000;

/** @throws Problem (usage). */
export function settlePower(wishes: PowerWishes): SettledPower {
  const { groups, totals, power } = wishes;
  const isTwoByTwo = groups.length === 2 && groups[0]!.probabilities.length <= 2;
  const simulated = !isTwoByTwo || totals !== undefined || wishes.statistic !== undefined;
  const alpha = share(wishes.alpha, 0.05, '--alpha');
  if (simulated) refuseExactOnes(wishes);
  else refuseSimulated(wishes);
  const sizes = sizesOf(wishes);
  if (!simulated && sizes.some((list) => Math.max(...list) > largestExact)) {
    throw usageProblem({
      code: 'out-of-range',
      message: `exact power is worked out for groups up to ${largestExact}`,
      place: '--sizes',
      hint: 'name a statistic, such as --statistic score, to have it simulated',
    });
  }
  const statistic = statisticNamed(wishes.statistic ?? 'pearson');
  const tail = oneOf(
    wishes.tail,
    simulated && statistic.sided === 'upper' ? 'upper' : 'both',
    ['upper', 'lower', 'both'] as const,
    '--tail',
  );
  const order = oneOf(wishes.order, 'score', powerOrders, '--order');
  return {
    groups,
    method: simulated ? 'simulation' : 'exact',
    fixed: totals === undefined ? 'rows' : 'total',
    sizes,
    wanted: power === undefined ? undefined : share(power, 0.8, '--power'),
    ratio: wishes.ratio ?? 1,
    largest: wholeNumber(wishes.largest ?? 500, 1, largestExact, '--largest'),
    testing: {
      test: oneOf(wishes.test, 'conditional', twoGroupTests, '--test'),
      order,
      tail,
      rule: ruleOf(wishes, tail, order, simulated),
      alpha: decimalRational(String(alpha))!,
    },
    tailGiven: wishes.tail !== undefined,
    alpha,
    statistic: statistic.name,
    pMethod: oneOf(wishes.method, 'auto', ['auto', 'exact', 'sample', 'asymptotic'] as const, '--method'),
    tables: wholeNumber(wishes.tables ?? 1000, 1, 1e7, '--number'),
    draws: wholeNumber(wishes.draws ?? 1000, 1, 1e9, '--draws'),
    effort: wishes.effort ?? standardTableEffort,
    seed: wishes.seed,
  };
}

function ruleOf(
  { twoSidedRule, test }: PowerWishes,
  tail: PowerTail,
  order: PowerOrder,
  simulated: boolean,
): PowerRule | null {
  if (tail !== 'both') {
    if (twoSidedRule !== undefined) throw unused('--two-sided-rule', `with --tail ${tail}`, 'leave it out');
    return null;
  }
  const rules = ['distance', 'probability', 'doubled'] as const;
  if (simulated || test !== 'unconditional') return oneOf(twoSidedRule, 'distance', rules, '--two-sided-rule');
  // An order by conditional p has no distance, one by a statistic no probability.
  const allowed =
    order === 'conditional-p' ? (['probability', 'doubled'] as const) : (['distance', 'doubled'] as const);
  return oneOf<PowerRule>(twoSidedRule, allowed[0], allowed, '--two-sided-rule');
}

function sizesOf({ groups, sizes, totals, power }: PowerWishes): (readonly number[])[] {
  if ([sizes, totals, power].filter((each) => each !== undefined).length !== 1) {
    throw usageProblem({
      code: 'sizes-or-power',
      message:
        sizes === undefined && totals === undefined && power === undefined
          ? 'neither sizes nor a power is named'
          : 'sizes, a total and a power to reach contradict each other',
      hint: 'give one of --sizes 40,40 (power of these), --power 0.8 (the smallest groups that reach it) and --total 80 (only the sum is fixed)',
    });
  }
  if (totals !== undefined) return totals.map((total) => [wholeNumber(total, 1, 1e9, '--total')]);
  return (sizes ?? []).map((list) => {
    const whole = list.length === 1 ? groups.map(() => list[0]!) : list;
    if (whole.length !== groups.length) {
      throw usageProblem({
        code: 'size-count',
        message: `${whole.length} sizes for ${groups.length} groups`,
        place: '--sizes',
        hint: `give one for each group, such as --sizes ${groups.map(() => 40).join()}, or one for all`,
      });
    }
    return whole.map((size) => wholeNumber(size, 1, 1e9, '--sizes'));
  });
}

function refuseExactOnes({ test, order, power, ratio, largest }: PowerWishes): void {
  const given = Object.entries({ test, order, power, ratio, largest }).find(([, value]) => value !== undefined);
  if (given === undefined) return;
  throw unused(
    `--${given[0]}`,
    'where the power is simulated (more than two groups or outcomes, --total, or --statistic)',
    'leave it out; sizes are searched for and the test is chosen by name only for two groups with one event each',
  );
}

function refuseSimulated({ method, tables, draws, effort, seed }: PowerWishes): void {
  const given = Object.entries({ method, number: tables, draws, effort, seed }).find(
    ([, value]) => value !== undefined,
  );
  if (given === undefined) return;
  throw unused(
    `--${given[0]}`,
    'where the power is exact (two groups with one event each)',
    'leave it out, or name a --statistic to have it simulated',
  );
}
