// Words for a p against a stated value other than none.
import { quoted } from './label-words.js';
import type { PValue, Result } from './result.js';

type Stated = NonNullable<PValue['nullValue']>;

/** As it is typed after --null-value. */
export const statedText = (stated: Stated): string =>
  `${stated.of}=${'value' in stated ? stated.value : stated.between.join()}`;

const measureWords = { difference: 'a difference', ratio: 'a ratio', 'odds-ratio': 'an odds ratio' } as const;
const nouns = { difference: 'difference', ratio: 'ratio', 'odds-ratio': 'odds ratio' } as const;

/** "an odds ratio of 2", "a difference between -0.1 and 0.1". */
export const statedWords = (stated: Stated): string =>
  'value' in stated
    ? `${measureWords[stated.of]} of ${stated.value}`
    : `${measureWords[stated.of]} between ${stated.between[0]} and ${stated.between[1]}`;

export const isEquivalence = ({ nullValue }: Pick<PValue, 'nullValue'>): boolean =>
  nullValue !== undefined && 'between' in nullValue;

/** Which p: "upper-tailed conditional p against a difference of -0.1"; undefined for a p against none. */
export function statedPName({ nullValue, tail, rule, method }: PValue): string | undefined {
  if (nullValue === undefined) return undefined;
  const kind = method === 'exact' ? 'conditional p' : 'unconditional p';
  if (!('value' in nullValue)) return `${kind} for ${statedWords(nullValue)} (the larger of two one-tailed)`;
  const side = { upper: 'upper-tailed', lower: 'lower-tailed', both: 'two-tailed' }[tail];
  return `${side} ${kind}${rule === undefined ? '' : ` (rule: ${rule})`} against ${statedWords(nullValue)}`;
}

/** What a small p of one tail speaks for: "the difference is larger". */
export function statedDirection({ nullValue, tail }: PValue): string | undefined {
  if (nullValue === undefined || !('value' in nullValue) || tail === 'both') return undefined;
  return `that the ${nouns[nullValue.of]} is ${tail === 'upper' ? 'larger' : 'smaller'}`;
}

/** Title of a report. */
export function statedQuestion({ statistic: { groups, event }, pValues }: Result): string | undefined {
  const { nullValue, tail } = pValues[0]!;
  if (nullValue === undefined || groups === undefined || event === undefined) return undefined;
  const [first, second] = groups.map(({ label }) => quoted(label));
  const joined = nullValue.of === 'difference' ? 'minus' : 'over';
  const subject = `Is the ${nouns[nullValue.of]} of ${quoted(event)}, ${first} ${joined} ${second},`;
  if (!('value' in nullValue)) return `${subject} between ${nullValue.between[0]} and ${nullValue.between[1]}?`;
  const where = { upper: 'above ', lower: 'below ', both: '' }[tail];
  return `${subject} ${where}${nullValue.value}?`;
}

/** What chance was taken to do. */
export function statedChance({ fixed }: Result['plan'], stated: Stated): string {
  const values = 'value' in stated ? `${stated.value}` : `${stated.between[0]}, or of ${stated.between[1]}`;
  if (stated.of === 'odds-ratio') {
    return `Chance deals the counts anew with every row and column total held, under an odds ratio of ${values}.`;
  }
  const line = fixed === 'columns' ? 'column' : 'row';
  return `The study fixed the ${line} totals only: chance draws each ${line} anew at its own total, with two unknown proportions under ${measureWords[stated.of]} of ${values}.`;
}

/** For the methods paragraph: what was tested, and how p came about. */
export function statedOpening({ nullValue }: PValue): string | undefined {
  if (nullValue === undefined) return undefined;
  const { of } = nullValue;
  const measured = `the ${nouns[of]} of the two ${of === 'odds-ratio' ? 'groups' : 'proportions'}, first ${of === 'difference' ? 'minus' : 'over'} second,`;
  return 'value' in nullValue
    ? `Of a 2 x 2 table, ${measured} was tested against ${nullValue.value}.`
    : `Of a 2 x 2 table, ${measured} was tested for equivalence, lying between ${nullValue.between[0]} and ${nullValue.between[1]}, by two one-tailed tests of which the larger p counts (Schuirmann 1987).`;
}

export function statedMethod(name: string, { nullValue, rule }: PValue): string | undefined {
  if (nullValue === undefined) return undefined;
  if (nullValue.of === 'odds-ratio') {
    const by =
      rule === 'probability'
        ? ' Two-tailed, a table is as extreme when it is no more probable than the observed one (Baptista & Pike 1977).'
        : rule === 'doubled'
          ? ' Two-tailed, the smaller one-tailed p is doubled, up to 1.'
          : '';
    return `${name} is exact: it adds up the probabilities, given both margins and the stated odds ratio (noncentral hypergeometric law; Fisher 1935; Cornfield 1956).${by}`;
  }
  const source = nullValue.of === 'difference' ? 'Farrington & Manning 1990' : 'Koopman 1984';
  const by =
    rule === 'distance'
      ? ' Two-tailed, an outcome is as extreme when its score lies at least as far from 0.'
      : rule === 'doubled'
        ? ' Two-tailed, the smaller one-tailed p is doubled, up to 1.'
        : '';
  return (
    `${name} is exact for two groups whose sizes were fixed beforehand: the largest probability, over all proportions that the stated ${nouns[nullValue.of]} allows, of all outcomes ` +
    `at least as extreme as the observed one (Chan 1998) by the score with the proportions that fit best under the stated value (Miettinen & Nurminen 1985; ${source}). ` +
    `The maximum is bounded from above by the Bernstein coefficients of that probability on ever smaller intervals (Bernstein 1912; de Casteljau 1959), and p is that bound.${by} ` +
    `Scores within 1e-8 of the observed one count as tied, which can make p larger, never smaller.`
  );
}

/** "the largest over the proportions that the difference allows (found at 0.25 in the second group)". */
export const statedPlace = (stated: Stated, place: string): string =>
  `the largest over the proportions that the ${nouns[stated.of]} allows (found at ${place} in the second group)`;
