// How the statistic is spread by chance alone, in characters: for terminals and for text in documents. The tail is told by
// another filling and by the axis below it, never by colour.
import { countWords, digits, statisticValueWords } from '../result/number-words.js';
import type { NullSummary } from '../result/result.js';

/** Eighths of a character's height, or plain ASCII for terminals that have nothing else. */
export type Characters = 'blocks' | 'ascii';

interface Filling {
  /** From the lowest part of a line to a whole line. */
  readonly bulk: string;
  readonly tail: string;
  readonly observed: string;
}

const fillings: Readonly<Record<Characters, Filling>> = {
  blocks: { bulk: '▁▂▃▄▅▆▇█', tail: '░▒▒▓', observed: '▲' },
  ascii: { bulk: '.:#', tail: 'x', observed: '^' },
};

const plotLines = 8;

/** Lines of at most `width` columns (from 38). Empty where the summary holds no bins. */
export function histogramLines(summary: NullSummary, width: number, characters: Characters): string[] {
  if (summary.bins.length === 0) return [];
  // The scale takes six characters at most.
  const shown = joinedBins(summary.bins, Math.max(1, width - 9));
  const highest = Math.max(...shown.map(({ mass }) => mass));
  const scale = [digits(highest, 2), '0'];
  const indent = Math.max(...scale.map((words) => words.length));
  const each = Math.max(1, Math.min(4, Math.floor((width - indent - 3) / shown.length)));
  const filling = fillings[characters];
  const rows = Array.from({ length: plotLines }, (_, k) => {
    const line = shown.map((bin) => partOf(bin, plotLines - 1 - k, highest, filling).repeat(each)).join('');
    return `${(k === 0 ? scale[0]! : '').padStart(indent)} |${line}`.trimEnd();
  });
  const axis = shown.map(({ inTail }) => (inTail > 0 ? '=' : '-').repeat(each)).join('');
  return [
    ...rows,
    `${scale[1]!.padStart(indent)} +${axis}`,
    pointer({ ...summary, bins: shown }, shown.length * each, each, indent + 2, width, filling),
  ];
}

/** Neighbours joined, as many to a bar as it takes for all to find room. */
function joinedBins(bins: NullSummary['bins'], most: number): NullSummary['bins'] {
  const together = Math.ceil(bins.length / most);
  if (together === 1) return bins;
  const sum = (values: readonly number[]): number => values.reduce((all, value) => all + value, 0);
  return Array.from({ length: Math.ceil(bins.length / together) }, (_, k) => {
    const some = bins.slice(k * together, (k + 1) * together);
    return {
      from: some[0]!.from,
      to: some.at(-1)!.to,
      mass: sum(some.map(({ mass }) => mass)),
      inTail: sum(some.map(({ inTail }) => inTail)),
    };
  });
}

/** What the drawing shows, for those who cannot see it and for all who read it. */
export function histogramWords({ bins, method, tables }: NullSummary): string {
  const inTail = bins.reduce((sum, bin) => sum + bin.inTail, 0);
  const [low, high] = [bins[0]!.from, bins.at(-1)!.to].map(endWords);
  const from = method === 'exact' ? `All ${countWords(tables)} tables` : `${countWords(tables)} random tables`;
  return `${from} with these margins, by their value of the statistic from ${low} to ${high}; = under the bars marks values at least as extreme as the observed one, which hold ${inTail === 0 ? 'none' : digits(inTail, 2)} of the probability here.`;
}

const endWords = (end: number | string): string =>
  typeof end === 'number' ? (end === 0 ? '0' : digits(end, 3)) : end === 'infinity' ? 'the largest' : 'the smallest';

function partOf(
  { mass, inTail }: NullSummary['bins'][number],
  line: number,
  highest: number,
  { bulk, tail }: Filling,
): string {
  const [whole, hatched] = [mass, inTail].map((part) => (part / highest) * plotLines - line) as [number, number];
  if (whole <= 0) return ' ';
  // Where a bar holds both, the line belongs to whichever takes more of it.
  const levels = hatched > Math.min(1, whole) / 2 ? tail : bulk;
  const filled = Math.min(1, whole);
  return levels[Math.min(levels.length - 1, Math.max(0, Math.ceil(filled * levels.length) - 1))]!;
}

/** An arrow under the bin of the observed value, with the value beside it. */
function pointer(
  { bins, observed }: NullSummary,
  across: number,
  each: number,
  indent: number,
  width: number,
  { observed: arrow }: Filling,
): string {
  const value = statisticValueWords(observed);
  const at = observed === 'infinity' ? Infinity : observed === '-infinity' ? -Infinity : observed;
  const end = (words: number | string): number =>
    typeof words === 'number' ? words : words === 'infinity' ? Infinity : -Infinity;
  const bin = bins.findIndex(({ to }) => at < end(to));
  const beyond = at > end(bins.at(-1)!.to) || (bin < 0 && Number.isFinite(end(bins.at(-1)!.to)));
  const words = beyond ? `observed ${value}, further out` : `observed ${value}`;
  const place = Math.min(across - 1, Math.floor(((bin < 0 ? bins.length - 1 : bin) + 0.5) * each));
  const column = indent + place;
  return column + words.length + 2 <= width
    ? `${' '.repeat(column)}${arrow} ${words}`
    : `${' '.repeat(Math.max(0, column - words.length - 1))}${words} ${arrow}`;
}
