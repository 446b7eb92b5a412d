// The words that the sentence, the methods paragraph and every report share: how a p-value, its method and its error
// are named. Statistics bring their own words from the registry.
import { pairedForms, pairedStatistics } from '../statistic/paired.js';
import { statistics } from '../statistic/registry.js';
import { stratifiedStatistics } from '../statistic/stratified.js';
import { isBootstrap, largestWords } from './design-words.js';
import { quoted } from './label-words.js';
import {
  bracketWords,
  countWords,
  digits,
  levelWords,
  probabilityWords,
  roundedTo,
  tinyWords,
} from './number-words.js';
import { statedDirection, statedPName } from './stated-words.js';
import type { PValue, PValueError, Result } from './result.js';

/** A result whose sentence and methods paragraph are still to be written. */
export type ResultBeforeWords = Omit<Result, 'sentence' | 'methods'>;

export type SamplingError = Extract<PValueError, { kind: 'sampling' }>;

/** Words of a statistic, from the registry; its bare name when it is none of ours. */
export const statisticWords = (name: string): string => known(name)?.words ?? `the statistic ${quoted(name)}`;

/** A statistic of the registry, or one of the named forms of it. */
const known = (name: string): { readonly words: string; readonly source: string } | undefined =>
  [
    ...statistics,
    ...statistics.flatMap(({ forms = [] }) => forms),
    ...pairedStatistics,
    ...pairedForms,
    ...stratifiedStatistics,
  ].find((one) => one.name === name);

/** The same without the explanation behind it, for the second mention. */
export const shortStatisticWords = (name: string): string => statisticWords(name).split(/ \(|, /)[0]!;

/** Words of a statistic with its source (author year) in brackets. */
export function citedStatistic(name: string): string {
  const words = statisticWords(name);
  const source = known(name)?.source.replace(/\((\d{4})\)/g, '$1');
  if (source === undefined) return words;
  return words.endsWith(')') ? `${words.slice(0, -1)}; ${source})` : `${words} (${source})`;
}

/** Change or agreement, for the statistics of pairs; undefined for the others. */
export const isAbout = (name: string): 'change' | 'agreement' | undefined =>
  pairedStatistics.find((one) => one.name === name)?.about;

export type SequentialError = Extract<PValueError, { kind: 'sequential' }>;

/** What drawing, of a fixed number or until settled, left unknown. */
export const drawingErrorOf = (p: PValue): SamplingError | SequentialError | undefined =>
  p.errors.find(
    (error): error is SamplingError | SequentialError => error.kind === 'sampling' || error.kind === 'sequential',
  );

export const samplingErrorOf = (p: PValue): SamplingError | undefined =>
  p.errors.find((error): error is SamplingError => error.kind === 'sampling');

export type BracketError = Extract<PValueError, { kind: 'bracket' }>;

/** Limits between which an exact p lies for certain. */
export const bracketOf = (p: PValue): BracketError | undefined =>
  p.errors.find((error): error is BracketError => error.kind === 'bracket');

const tailWords = { upper: 'upper-tailed', lower: 'lower-tailed', both: 'two-tailed' } as const;

/** Which p: "two-tailed permutation p (rule: distance)". */
export function pName(p: PValue): string {
  const stated = statedPName(p);
  if (stated !== undefined) return stated;
  return `${tailWords[p.tail]} ${pKind(p) === '' ? 'p' : `${pKind(p)} p`}${ruleWords(p)}`;
}

const ruleWords = ({ rule }: PValue): string => (rule === undefined ? '' : ` (rule: ${rule})`);

/** The tail with its rule: "two-tailed (rule: distance)". */
export const tailOf = (p: PValue): string => `${tailWords[p.tail]}${ruleWords(p)}`;

/** What kind of p it is, by what chance was taken to do; nothing for an approximation. */
export function pKind(p: PValue): string {
  if (p.method === 'asymptotic') return '';
  if (p.method === 'unconditional') return 'unconditional';
  return isBootstrap(p) ? 'parametric-bootstrap' : 'permutation';
}

/** The number itself, no further than its error allows. */
export function pNumber(p: PValue): string {
  if (p.p === null) return p.log10P === null ? 'unknown' : tinyWords(p.log10P);
  const drawn = drawingErrorOf(p);
  if (drawn !== undefined) return roundedTo(spreadOf(drawn) ?? p.p, p.p);
  const bracket = bracketOf(p);
  return bracket === undefined ? probabilityWords(p.p) : roundedTo(bracket.upper - bracket.lower, p.p);
}

/** A probability that goes with a p (strict, mid), shown to the same error. */
export function besideP(p: PValue, value: number): string {
  const drawn = drawingErrorOf(p);
  if (drawn !== undefined) return roundedTo(spreadOf(drawn) ?? drawn.interval[1], value);
  const bracket = bracketOf(p);
  return bracket === undefined ? probabilityWords(value) : roundedTo(bracket.upper - bracket.lower, value);
}

/** How the p was found, as the end of a clause: "exact", "from 100,000 random tables ...". */
export function foundWords(
  p: PValue,
  seed: string | null,
  drawn = `random tables with the same ${isBootstrap(p) ? 'total' : 'margins'}`,
): string {
  if (p.method === 'exact') return bracketOf(p) === undefined ? 'exact' : 'exact up to that bracket';
  if (p.method === 'unconditional') return largestWords(p);
  const chain = p.errors.find((error) => error.kind === 'chain');
  if (chain !== undefined) {
    return `from a chain of ${countWords(chain.tables)} tables with the same margins and impossible cells${seed === null ? '' : ` (seed ${quoted(seed)})`}`;
  }
  if (p.method === 'sample') {
    const draws = drawingErrorOf(p)?.draws;
    const many =
      draws === undefined
        ? drawn
        : draws === 1
          ? `1 ${drawn.replace('tables', 'table')}`
          : `${countWords(draws)} ${drawn}`;
    return `sampled from ${many}${seed === null ? '' : ` (seed ${quoted(seed)})`}`;
  }
  return `by the ${approximationName(p)} approximation`;
}

export const approximationName = (p: PValue): string => (p.degreesOfFreedom === undefined ? 'normal' : 'chi-square');

/** What is known of the error of a p, as an aside: empty for an exact one. */
export function errorAside(p: PValue): string {
  const drawn = drawingErrorOf(p);
  const bracket = bracketOf(p);
  if (bracket !== undefined) return ` (certified bracket ${bracketWords(bracket.lower, bracket.upper)})`;
  if (drawn === undefined) return p.method === 'asymptotic' ? ' (error unknown)' : '';
  if (drawn.kind === 'sequential') return ` (${limitsWords(drawn)} at every look)`;
  const { standardError } = drawn;
  return ` (${standardError === null ? '' : `standard error ${standardErrorWords(standardError)}, `}${intervalWords(drawn)})`;
}

const standardErrorWords = (error: number): string => digits(error, 2);

const intervalWords = ({ confidence, interval: [lower, upper] }: SamplingError): string =>
  `${levelWords(confidence)} interval ${probabilityWords(lower)} to ${probabilityWords(upper)}`;

const limitsWords = ({ level, interval: [lower, upper] }: SequentialError): string =>
  `${levelWords(level)} limits ${probabilityWords(lower)} to ${probabilityWords(upper)}`;

/** A standard error, or for limits a quarter of their distance; undefined where draws saw no spread. */
function spreadOf(error: SamplingError | SequentialError): number | undefined {
  if (error.kind === 'sampling') return error.standardError ?? undefined;
  const [lower, upper] = error.interval;
  return error.atLeast === 0 ? undefined : (upper - lower) / 4;
}

export const degreesWords = (degrees: number): string => `${degrees} degree${degrees === 1 ? '' : 's'} of freedom`;

/** What the tail means for two groups: which of them has the greater share of events. */
export function directionWords(result: ResultBeforeWords, p: PValue): string | undefined {
  const { groups, event } = result.statistic;
  if (p.nullValue !== undefined) return statedDirection(p);
  if (p.statistic === 'mcnemar' && p.tail !== 'both') {
    const [first, second] = result.input.rowLabels.map(quoted) as [string, string];
    return p.tail === 'upper'
      ? `more from ${first} to ${second} than back`
      : `more from ${second} to ${first} than back`;
  }
  if (groups === undefined || event === undefined || p.tail === 'both' || p.statistic !== result.statistic.name) {
    return undefined;
  }
  const [first, second] = groups;
  return `${quoted(event)} more common in ${quoted((p.tail === 'upper' ? first : second).label)}`;
}

/** One p-value as one sentence, its error in it. */
export function pSentence(result: ResultBeforeWords, p: PValue): string {
  const direction = directionWords(result, p);
  const aside = direction === undefined ? '' : ` (${direction})`;
  const guarantee = p.guaranteed || p.method === 'asymptotic' ? '' : ', not guaranteed';
  const of = p.nullValue === undefined ? ` of ${shortStatisticWords(p.statistic)}` : '';
  return `The ${pName(p)}${of}${aside} is ${pNumber(p)}${shortFoundWords(p)}${guarantee}.`;
}

function shortFoundWords(p: PValue): string {
  if (p.method === 'exact') {
    return bracketOf(p) === undefined ? ', exact' : `${errorAside(p)}, exact up to that bracket`;
  }
  if (p.method === 'unconditional') return `, ${largestWords(p)}`;
  if (p.method === 'sample') return `${errorAside(p)}, from the same draws`;
  const degrees = p.degreesOfFreedom === undefined ? '' : ` on ${degreesWords(p.degreesOfFreedom)}`;
  return ` by the ${approximationName(p)} approximation${degrees}; its error is unknown`;
}

/** "4 x 5 table of 592 counts". */
export const tableWords = ({ input }: ResultBeforeWords): string =>
  `${input.rowLabels.length} x ${input.columnLabels.length} table of ${countWords(input.total)} counts`;

/** True when the margins leave one table only, so that no p below 1 can arise. */
export const isOneTableOnly = (result: ResultBeforeWords): boolean =>
  result.notes.some((note) => note.code === 'only-one-table');
