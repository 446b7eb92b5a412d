// How much hangs on a single count: the least p that the margins can give, and p with one count in another cell.
import { quoted, shown } from '../../result/label-words.js';
import { probabilityWords, tinyWords } from '../../result/number-words.js';
import type { Fragility, Result } from '../../result/result.js';
import type { Block } from '../page.js';

export function fragilityBlocks({ pValues, fragility, plan }: Result): Block[] {
  const least = pValues[0]!.leastAttainable;
  return [
    ...(least === undefined ? [] : [leastWords(least, plan.alpha)]),
    ...(fragility === undefined ? [] : [movedWords(fragility, plan.alpha)]),
  ].map((text) => ({ kind: 'sentence', text: shown(text), tone: 'plain' }));
}

function leastWords(least: number, alpha: number): string {
  const words = `The least p that any table with these margins could give is ${probabilityWords(least)}`;
  return least > alpha ? `${words}: with these margins p could never have come down to ${alpha}.` : `${words}.`;
}

/** Dupont (1986). */
function movedWords({ smallest, largest }: Fragility, alpha: number): string {
  const number = ({ p, log10P }: Fragility['smallest']): string =>
    p === null ? (log10P === null ? 'unknown' : tinyWords(log10P)) : probabilityWords(p);
  const move = ({ from, to }: Fragility['smallest']): string => {
    const [what, one, other] =
      from.row === to.row ? [from.row, from.column, to.column] : [from.column, from.row, to.row];
    return `one of ${quoted(what)} moved from ${quoted(one)} to ${quoted(other)}`;
  };
  const crosses = (smallest.p ?? 0) <= alpha && (largest.p ?? 0) > alpha;
  return (
    `One count in a neighbouring cell would bring p to between ${number(smallest)} (${move(smallest)}) and ` +
    `${number(largest)} (${move(largest)}); Dupont 1986.${crosses ? ` One count decides on which side of ${alpha} it lies.` : ''}`
  );
}
