// What p would have been under another choice, gathered in one place: ties, tail, statistic, approximation, order, design.
// Each line is the end of one sentence and names the two-sided rule wherever there is one.
import { besideP, directionWords, errorAside, isOneTableOnly, pKind, pNumber } from '../../result/describe.js';
import { approximationName, bracketOf, degreesWords, shortStatisticWords, tailOf } from '../../result/describe.js';
import { designEnding } from '../../result/design-words.js';
import { shown } from '../../result/label-words.js';
import type { PValue, Result } from '../../result/result.js';
import type { Block, Endings } from '../page.js';
import { orderEndings } from './order.js';
import { isOfAgreement } from './strata.js';

type Ending = Endings['endings'][number];

export function choiceBlocks(result: Result): Block[] {
  if (isOneTableOnly(result)) return [];
  const [headline, ...others] = result.pValues.filter(({ statistic }) => !isOfAgreement(statistic));
  const endings = [
    ...tiesEndings(headline!),
    ...others.map((p) => ending(result, p)),
    ...orderEndings(result),
    ...designEndings(result, others),
  ];
  if (endings.length === 0) return [];
  return [
    {
      kind: 'endings',
      start: 'p would be',
      endings: endings.map(({ number, words }) => ({ number: shown(number), words: shown(words) })),
    },
    { kind: 'sentence', text: settleFirst, tone: 'plain' },
  ];
}

const settleFirst =
  'Such choices belong before the counts are seen: the smallest of several p-values is no longer a p-value.';

/** What counting ties by half, or not at all, makes of p, where it shows. */
function tiesEndings(p: PValue): Ending[] {
  if (p.mid === null || p.strict === null || p.tied === 0) return [];
  const [mid, strict] = [besideP(p, p.mid), besideP(p, p.strict)];
  if (mid === pNumber(p) && strict === mid) return [];
  const tail = p.nullValue === undefined ? `${tailOf(p)}, ` : '';
  return [
    { number: mid, words: `${tail}with ties counted by half (mid-p, Lancaster 1961), not guaranteed` },
    { number: strict, words: `${tail}with ties left out, not guaranteed` },
  ];
}

/** One of the p-values that stand beside the headline. */
function ending(result: Result, p: PValue): Ending {
  const direction = directionWords(result, p);
  const isOther = p.statistic !== result.statistic.name;
  const words = [
    `${tailOf(p)}${direction === undefined ? '' : ` (${direction})`}`,
    ...(isOther ? [`by ${shortStatisticWords(p.statistic)}`] : []),
    ...foundWords(p),
  ].join(', ');
  return { number: pNumber(p), words };
}

function foundWords(p: PValue): string[] {
  const guarantee = p.guaranteed || p.method === 'asymptotic' ? [] : ['not guaranteed'];
  switch (p.method) {
    case 'exact':
      return [bracketOf(p) === undefined ? 'exact' : `exact up to its bracket${errorAside(p)}`, ...guarantee];
    case 'unconditional':
      return [`${pKind(p)}, exact`, ...guarantee];
    case 'sample':
      return [`from the same draws${errorAside(p)}`, ...guarantee];
    case 'asymptotic': {
      const degrees = p.degreesOfFreedom === undefined ? '' : ` on ${degreesWords(p.degreesOfFreedom)}`;
      return [`by the ${approximationName(p)} approximation${degrees}, error unknown`];
    }
  }
}

/** Other designs; the one that holds both margins may stand among the p-values already. */
const designEndings = ({ designs = [], plan }: Result, others: readonly PValue[]): Ending[] =>
  designs
    .filter(({ assumed, method, p }) => !assumed && !others.some((other) => other.method === method && other.p === p))
    .map((line) => designEnding(line, plan));
