// Which lines differ: a small table of comparisons, each with its own p and the one adjusted over all.
import { errorAside, pNumber, shortStatisticWords } from '../../result/describe.js';
import { quoted, shown } from '../../result/label-words.js';
import { probabilityWords } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import type { Block, Sentence } from '../page.js';

type Comparisons = NonNullable<Result['comparisons']>;

const plain = (text: string): Sentence => ({ kind: 'sentence', text: shown(text), tone: 'plain' });

export function comparisonBlocks({ comparisons }: Result): Block[] {
  if (comparisons === undefined) return [];
  const { side, control, pairs } = comparisons;
  if (pairs.length === 0) return [plain(`Fewer than two ${side} hold counts, so there is nothing to compare.`)];
  const which = control === undefined ? `every two ${side}` : `each of the other ${side} against ${quoted(control)}`;
  return [
    plain(
      `Compared: ${which}, by ${shortStatisticWords(pairs[0]!.statistic.name)} on the table of those two alone. Adjusted step-down (Holm 1979), which holds the probability of any false difference at the level, whichever lines differ.`,
    ),
    { kind: 'grid', headings: ['pair', 'p', 'found', 'adjusted p'], rows: pairs.map(rowOf) },
  ];
}

const rowOf = ({ first, second, p, adjustedP }: Comparisons['pairs'][number]): string[] => [
  `${shown(first)} / ${shown(second)}`,
  pNumber(p),
  p.method === 'exact' ? 'exact' : p.method === 'sample' ? `sampled${errorAside(p)}` : 'asymptotic',
  adjustedP === null ? 'none' : probabilityWords(adjustedP),
];
