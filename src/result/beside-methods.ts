// What a methods paragraph says of analyses that stand beside the test: those of a declared order, and lines compared.
import { citedStatistic, pName, shortStatisticWords, type ResultBeforeWords } from './describe.js';
import { foundWords } from './describe.js';
import { quoted } from './label-words.js';
import { levelWords } from './number-words.js';

/** undefined where no order was declared. */
export function orderMethods({ order, effects = [], plan }: ResultBeforeWords): string | undefined {
  if (order === undefined) return undefined;
  const tests = order.questions.map(
    ({ p, seed }) => `${citedStatistic(p.statistic)}, its ${pName(p)} ${foundWords(p, seed ?? null)}`,
  );
  const sides = order.ordered === 'both' ? 'rows and columns' : order.ordered;
  const declared = `The ${sides} were taken in the order listed`;
  const measured = effects.some(({ name }) => name === 'gamma')
    ? `gamma (Goodman & Kruskal 1954), tau-b (Kendall 1945), tau-c (Stuart 1953) and Somers' d (Somers 1962) have large-sample ` +
      `${levelWords(plan.confidence)} intervals (Goodman & Kruskal 1963; Brown & Benedetti 1977)`
    : undefined;
  return `${[declared, ...tests, measured].filter((part) => part !== undefined).join('; ')}.`;
}

/** undefined where no lines were compared. */
export function comparisonMethods({ comparisons }: ResultBeforeWords): string | undefined {
  const [first] = comparisons?.pairs ?? [];
  if (comparisons === undefined || first === undefined) return undefined;
  const { side, control } = comparisons;
  const which = control === undefined ? `Every two ${side}` : `Each of the other ${side} and ${quoted(control)}`;
  return `${which} were compared by ${shortStatisticWords(first.statistic.name)} on the table of those two alone, the p-values adjusted step-down (Holm 1979).`;
}
