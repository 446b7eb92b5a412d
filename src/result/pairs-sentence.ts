// One line for a report on change in pairs: how many changed and which way, then the p.
import {
  degreesWords,
  directionWords,
  drawingErrorOf,
  errorAside,
  isAbout,
  pName,
  pNumber,
  approximationName,
  shortStatisticWords,
  type ResultBeforeWords,
} from './describe.js';
import { quoted } from './label-words.js';
import { intervalWords } from './headline-effect.js';
import { countWords, digits, percentWords, pointsWords, statisticValueWords } from './number-words.js';
import type { Effect } from './result.js';

/** Labels in it are quoted and show no control characters. */
export function changeSentence(result: ResultBeforeWords): string {
  const headline = result.pValues[0]!;
  const { value, degreesOfFreedom, name } = result.statistic;
  const degrees = degreesOfFreedom === undefined ? '' : ` (${degreesWords(degreesOfFreedom)})`;
  const words = `${shortStatisticWords(name)} is ${statisticValueWords(value ?? 0)}${degrees}`;
  const way = directionWords(result, headline);
  return (
    `${seenWords(result)}; ${words} and its ${pName(headline)}${way === undefined ? '' : ` (${way})`} is ` +
    `${pNumber(headline)}${errorAside(headline)}${headline.method === 'asymptotic' ? ' ' : ', '}${foundBy(result)}.`
  );
}

function seenWords({ input, statistic, effects = [] }: ResultBeforeWords): string {
  const { counts, rowLabels, rowTotals, columnTotals, total } = input;
  const all = `Of ${countWords(total)} pairs`;
  if (statistic.name !== 'mcnemar') {
    const changed = total - counts.reduce((sum, row, k) => sum + row[k]!, 0);
    return `${all} in ${rowLabels.length} levels, ${countWords(changed)} lie off the diagonal${furthestWords(effects)}`;
  }
  const [there, back] = [counts[0]![1]!, counts[1]![0]!];
  const [first, second] = rowLabels.map(quoted) as [string, string];
  const shares = `${percentWords(rowTotals[0]! / total)} in the rows, ${percentWords(columnTotals[0]! / total)} in the columns`;
  return (
    `${all}, ${countWords(there)} went from ${first} to ${second} and ${countWords(back)} back ` +
    `(${first}: ${shares}; rows minus columns: ${pointsWords((there - back) / total)}${limitsWords(effects.find(isDifference))})`
  );
}

const isDifference = ({ name }: Effect): boolean => name === 'matched-difference';

/** ", 95% interval -22.9 to 1.75", by the score method. */
function limitsWords(effect: Effect | undefined): string {
  const words = intervalWords(
    effect?.intervals.find(({ method }) => method === 'tango'),
    (limit) => (typeof limit === 'number' ? digits(100 * limit, 3) : limit),
  );
  return words === undefined ? '' : `, ${words}`;
}

/** The level whose two shares differ most. */
function furthestWords(effects: readonly Effect[]): string {
  const size = ({ estimate }: Effect): number => (typeof estimate === 'number' ? Math.abs(estimate) : -1);
  const [furthest] = effects.filter(isDifference).sort((a, b) => size(b) - size(a));
  if (furthest === undefined || typeof furthest.estimate !== 'number') return '';
  return `, the share of ${quoted(furthest.event ?? '')} differs most (rows minus columns: ${pointsWords(furthest.estimate)}${limitsWords(furthest)}, taken alone)`;
}

function foundBy({ plan, pValues }: ResultBeforeWords): string {
  const p = pValues[0]!;
  if (p.method === 'exact') return 'exact';
  if (p.method === 'asymptotic') return `by the ${approximationName(p)} approximation`;
  const draws = countWords(drawingErrorOf(p)?.draws ?? 0);
  return `sampled by turning the changed pairs round at random ${draws} times${plan.seed === null ? '' : ` (seed ${quoted(plan.seed)})`}`;
}

/** True for results about change in pairs, whose words differ; agreement is worded as association is. */
export const isAboutChange = (result: ResultBeforeWords): boolean => isAbout(result.statistic.name) === 'change';
