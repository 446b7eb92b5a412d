// The report in one line: the statistic, its p with the error that p has, and how many counts there were.
import { errorAside, foundWords, pName, pNumber, shortStatisticWords } from '../result/describe.js';
import { shown } from '../result/label-words.js';
import { countWords, statisticValueWords } from '../result/number-words.js';
import type { PValue, Result } from '../result/result.js';
import { capital } from './capital.js';

export function briefLine({ statistic, pValues, plan, input }: Result): string {
  const headline = pValues[0]!;
  const value = statistic.value === null ? 'undefined' : statisticValueWords(statistic.value);
  const by = headline.method === 'asymptotic' ? ' ' : ', ';
  const answer = `${pName(headline)} ${pNumber(headline)}${errorAside(headline)}${by}${foundWords(headline, plan.seed)}`;
  const measured = headline.nullValue === undefined ? `${shortStatisticWords(statistic.name)} ${value}; ` : '';
  const line = `${measured}${answer}${roundingWords(headline)}; n ${countWords(input.total)}`;
  return `${shown(capital(line))}\n`;
}

function roundingWords({ errors, method }: PValue): string {
  const rounding = errors.find((error) => error.kind === 'rounding');
  if (method !== 'exact' || rounding === undefined || rounding.relative === 0) return '';
  return ` (rounding at most ${rounding.relative.toExponential(1)} of it)`;
}
