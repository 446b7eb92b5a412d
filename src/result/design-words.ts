// Words for what the study held fixed, and for p-values that rest on it.
import { countWords, digits, probabilityWords, tinyWords } from './number-words.js';
import { statedChance, statedPlace } from './stated-words.js';
import type { PValue, Result } from './result.js';

type Fixed = Result['plan']['fixed'];

/** A p from tables drawn with fitted proportions. */
export const isBootstrap = ({ method, errors }: PValue): boolean =>
  method === 'sample' && errors.some(({ kind }) => kind === 'approximation');

/** What chance was taken to do, in the report. */
export function chanceSentence(plan: Result['plan'], headline: PValue): string {
  if (plan.nullValue !== undefined) return statedChance(plan, plan.nullValue);
  if (headline.method !== 'unconditional' && !isBootstrap(headline)) {
    return plan.fixed === 'both'
      ? 'Chance deals the counts anew with every row and column total held.'
      : `The study fixed ${fixedWords(plan.fixed)}; chance deals the counts anew with every row and column total held, which stays valid.`;
  }
  if (plan.fixed === 'total') {
    return 'The study fixed the total only: chance draws a table of that total anew, rows and columns unrelated and their proportions unknown.';
  }
  const [line, other] = plan.fixed === 'rows' ? ['row', 'column'] : ['column', 'row'];
  return `The study fixed the ${line} totals only: chance draws each ${line} anew at its own total, with one unknown proportion common to both; ${other} totals may come out otherwise.${riskWords(plan)}`;
}

const riskWords = ({ nuisanceRisk }: Result['plan']): string =>
  nuisanceRisk === undefined
    ? ''
    : ` The proportion is looked for in an interval that misses it with probability ${nuisanceRisk} at most, which is added to p (Berger & Boos 1994).`;

const shareWords = (share: number): string => (share === 0 || share === 1 ? String(share) : digits(share, 3));

export function fixedWords(fixed: Fixed): string {
  switch (fixed) {
    case 'both':
      return 'both margins';
    case 'rows':
      return 'the row totals only';
    case 'columns':
      return 'the column totals only';
    case 'total':
      return 'the total only';
    case 'pairs':
      return 'the number of pairs';
    case 'strata':
      return 'the margins of every stratum';
    case 'clusters':
      return 'the clusters';
  }
}

/** "exact, the largest over the unknown proportion (found at 0.132)". */
export const largestWords = (p: Pick<PValue, 'nuisance' | 'nullValue'>): string =>
  `exact, ${p.nullValue === undefined || p.nuisance === undefined ? placeWords(p.nuisance) : statedPlace(p.nullValue, shareWords(p.nuisance.value))}`;

function placeWords(nuisance: PValue['nuisance']): string {
  if (nuisance === undefined) return 'the largest over what is unknown';
  const { value, second } = nuisance;
  return second === undefined
    ? `the largest over the proportion common to both groups (found at ${shareWords(value)})`
    : `the largest over the proportions of the first row and the first column (found at ${shareWords(value)} and ${shareWords(second)})`;
}

type DesignLine = NonNullable<Result['designs']>[number];

/** p had the study fixed something else, as the end of "p would be". */
export function designEnding(line: DesignLine, { nuisanceRisk }: Result['plan']): { number: string; words: string } {
  const { fixed, p, log10P, reason, workUnits, orderedBy, nuisance, method } = line;
  const start = `had the study fixed ${fixedWords(fixed)} (--fixed ${fixed})`;
  if (reason === 'over-bound') {
    const work = workUnits === undefined ? '' : `: forecast at ${countWords(Number(workUnits.toPrecision(2)))} units`;
    return { number: 'unknown', words: `${start}, which takes more work than is done unasked${work}` };
  }
  const place =
    nuisance === undefined
      ? ''
      : nuisance.second === undefined
        ? `, at a common proportion of ${shareWords(nuisance.value)}${nuisanceRisk === undefined ? '' : `, the risk ${nuisanceRisk} added too`}`
        : `, at proportions of ${shareWords(nuisance.value)} and ${shareWords(nuisance.second)}`;
  const kind =
    method === 'unconditional' ? 'unconditional' : method === 'sample' ? 'sampled permutation' : 'permutation';
  return {
    number: p === null ? tinyWords(log10P ?? 0) : probabilityWords(p),
    words: `${start}: ${kind}, ordered by ${orderedBy ?? 'nothing'}${place}`,
  };
}

/** For the methods paragraph. */
export function unconditionalSentence(name: string, p: PValue, plan: Result['plan']): string {
  if (plan.fixed === 'total') {
    return (
      `${name} is exact for a table of which only the total was fixed beforehand: the largest probability, over the unknown proportions of the first row ` +
      `and the first column, of all tables at least as extreme as the observed one (Barnard 1947). ${boundSentence}`
    );
  }
  const order =
    plan.outcomeOrder === 'conditional-p'
      ? `, ordered by their ${p.orderedBy} (Boschloo 1970)`
      : ' (Barnard 1945; Suissa & Shuster 1985)';
  const risk =
    plan.nuisanceRisk === undefined
      ? ''
      : ` The proportion was looked for in a ${digits(1 - plan.nuisanceRisk, 8)} confidence interval, and ${plan.nuisanceRisk} added to p (Berger & Boos 1994).`;
  return (
    `${name} is exact for two groups whose sizes were fixed beforehand: the largest probability, over the unknown proportion common to both groups, ` +
    `of all outcomes at least as extreme as the observed one${order}. ${boundSentence}${risk}`
  );
}

const boundSentence =
  'The maximum is bounded from above by the Bernstein coefficients of that probability on ever smaller intervals (Bernstein 1912; de Casteljau 1959), and p is that bound.';

export const bootstrapWords =
  'random tables with the same total, drawn with the proportions fitted under independence (parametric bootstrap; Davison & Hinkley 1997)';
