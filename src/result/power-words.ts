// A planned study in words: one sentence for a protocol, and the paragraph behind it.
import { citedStatistic } from './describe.js';
import { quoted } from './label-words.js';
import { countWords, digits, percentWords } from './number-words.js';
import type { PowerAnswer, PowerResult } from './power-declaration.js';

type Before = Omit<PowerResult, 'sentence' | 'methods'>;

export function powerSentence(result: Before): string {
  const { plan, answers, smallest } = result;
  const test = testName(plan);
  if (smallest !== undefined) return searchSentence(result, test);
  const [first] = answers;
  if (first === undefined) return `No sizes were named for ${test}.`;
  return `With ${sizesWords(plan, first)}, ${test} at the level ${plan.alpha} rejects with probability ${powerNumber(first)} when ${truthWords(plan)}.`;
}

function searchSentence({ plan, answers, smallest }: Before, test: string): string {
  const wanted = percentWords(plan.wanted!);
  if (smallest!.reached === null) {
    return `No group sizes up to ${smallest!.lookedAtTo} give ${test} at the level ${plan.alpha} a power of ${wanted} when ${truthWords(plan)}.`;
  }
  const reached = answers[smallest!.reached]!;
  const steady = smallest!.steady === null ? undefined : answers[smallest!.steady]!;
  const later =
    steady === undefined
      ? '; larger ones fall short again'
      : steady === reached
        ? ''
        : `; from ${sizesWords(plan, steady)} on no larger ones that were looked at (to ${smallest!.lookedAtTo}) fall short again`;
  return `The smallest groups that give ${test} at the level ${plan.alpha} a power of ${wanted} when ${truthWords(plan)} are ${sizesWords(plan, reached)} (power ${powerNumber(reached)})${later}.`;
}

/** "the two-tailed conditional exact test (rule: distance)". */
export function testName({ method, test, order, tail, twoSidedRule, statistic }: PowerResult['plan']): string {
  const tails = { upper: 'upper-tailed', lower: 'lower-tailed', both: 'two-tailed' }[tail];
  const rule = twoSidedRule === null ? '' : ` (rule: ${twoSidedRule})`;
  if (method === 'simulation') return `the ${tails} permutation test of ${statistic!}${rule}`;
  const kind =
    test === 'unconditional'
      ? `unconditional exact test ordered by ${order === 'conditional-p' ? 'conditional p' : `the ${order!} statistic`}`
      : test === 'mid'
        ? 'mid-p test'
        : 'conditional exact test';
  return `the ${tails} ${kind}${rule}`;
}

export const sizesWords = ({ groups }: PowerResult['plan'], { sizes, total }: PowerAnswer): string =>
  sizes === null
    ? `${countWords(total)} units in all`
    : sizes.map((size, g) => `${countWords(size)} in ${quoted(groups[g]!.label)}`).join(' and ');

/** No further than its error allows. */
export function powerNumber({ power, error }: PowerAnswer): string {
  if (error.kind === 'rounding') return digits(power, 4);
  const [lower, upper] = error.interval;
  return `${digits(power, 3)} (99% limits ${digits(lower, 3)} to ${digits(upper, 3)})`;
}

function truthWords({ groups, fixed }: PowerResult['plan']): string {
  if (groups.every(({ probabilities }) => probabilities.length === 1)) {
    return `the event has probability ${groups.map(({ label, probabilities }) => `${probabilities[0]!} in ${quoted(label)}`).join(' and ')}`;
  }
  return fixed === 'rows'
    ? `the outcomes have probabilities ${groups.map(({ label, probabilities }) => `${probabilities.join(', ')} in ${quoted(label)}`).join('; ')}`
    : 'the cells have the stated probabilities';
}

export function powerMethods(result: Before): string {
  const { plan, tool } = result;
  const software = `Computed with ${tool.name} ${tool.version}.`;
  if (plan.method === 'exact') {
    const source =
      plan.test === 'unconditional'
        ? plan.order === 'conditional-p'
          ? 'Boschloo 1970'
          : 'Barnard 1945; Suissa & Shuster 1985'
        : plan.test === 'mid'
          ? 'Lancaster 1961'
          : 'Fisher 1935';
    return (
      `Power is exact: the probabilities of all outcomes that ${testName(plan)} (${source}) rejects at p <= ${plan.alpha}, two independent binomials ` +
      `with the stated probabilities, were added up. The size is the largest such probability when both groups are alike, over every common proportion. ${software}`
    );
  }
  return (
    `Power was estimated from ${countWords(plan.tables!)} tables drawn with the stated probabilities (${plan.fixed === 'rows' ? 'group sizes fixed' : 'only the total fixed'}; ` +
    `seed ${quoted(plan.seed ?? '')}), each tested with ${citedStatistic(plan.statistic!)} and counted as rejected at p <= ${plan.alpha}; limits after Clopper & Pearson (1934). ${software}`
  );
}
