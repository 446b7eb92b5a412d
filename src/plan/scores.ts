// The scores of ordered lines as wished: a list, midranks, or 1, 2, 3, ...; checked against the whole table before its
// empty lines are left out.
import { decimalRational, toDouble, type Rational } from '../numeric/rational.js';
import { usageProblem } from '../problem/problem.js';
import { midranks, standardScores } from '../statistic/scores.js';

/** A comma list of decimals ("0,1,2.5"), the word `midranks`, or numbers. */
export type ScoreWish = string | readonly number[];

export interface ChosenScores {
  /** One for each live line, exact. */
  readonly exact: readonly Rational[];
  /** One for each line of the whole table; their shortest decimals are the exact scores. */
  readonly asNumbers: readonly number[];
}

/**
 * @param totals of all lines of the side, empty ones too; `live` indexes those that are not.
 * @throws Problem (usage): `score-count`, `not-a-score`, `score-digits`.
 */
export function scoresOf(
  wish: ScoreWish | undefined,
  totals: readonly number[],
  live: readonly number[],
  option: '--row-scores' | '--column-scores',
): ChosenScores {
  const all = allScores(wish, totals, option);
  return { exact: live.map((line) => all[line]!), asNumbers: all.map(toDouble) };
}

function allScores(wish: ScoreWish | undefined, totals: readonly number[], option: string): Rational[] {
  if (wish === undefined) return standardScores(totals.map((_, line) => line));
  if (wish === 'midranks') return midranks(totals);
  const texts = typeof wish === 'string' ? wish.split(',') : wish.map(String);
  const scores = texts.map((text) => oneScore(text, option));
  if (scores.length !== totals.length) {
    const lines = option === '--row-scores' ? 'rows' : 'columns';
    throw usageProblem({
      code: 'score-count',
      message: `${texts.length} score${texts.length === 1 ? '' : 's'} for ${totals.length} ${lines}`,
      place: option,
      hint: `give one for each of the ${lines}, empty ones too, in their order: ${option} ${totals.map((_, k) => k + 1).join()}`,
    });
  }
  return scores;
}

function oneScore(text: string, option: string): Rational {
  const score = decimalRational(text);
  if (score === undefined) {
    throw usageProblem({
      code: 'not-a-score',
      message: `"${text.trim()}" is not a number`,
      place: option,
      hint: /^mid/i.test(text.trim())
        ? `did you mean ${option} midranks?`
        : `scores are decimals separated by commas, such as ${option} 0,1,2.5, or the word midranks`,
    });
  }
  // The plan holds scores as numbers; a run again must read the same ones.
  const size = Math.abs(toDouble(score));
  const again = size > 1e100 || (size > 0 && size < 1e-100) ? undefined : decimalRational(String(toDouble(score)));
  if (again === undefined || again.numerator !== score.numerator || again.denominator !== score.denominator) {
    throw usageProblem({
      code: 'score-digits',
      message: `"${text.trim()}" is longer, larger or smaller than a score can be`,
      place: option,
      hint: 'give at most 15 significant digits, and sizes from 1e-100 to 1e100',
    });
  }
  return score;
}
