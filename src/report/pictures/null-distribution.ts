// How the statistic is spread by chance alone: bars for the tables with these margins, those at least as extreme as the
// observed one hatched, the approximation as a curve over them.
import { max } from 'd3-array';
import { format } from 'd3-format';
import { scaleLinear } from 'd3-scale';
import { curveNatural, line as lineOf } from 'd3-shape';
import { pName, pNumber, shortStatisticWords } from '../../result/describe.js';
import { countWords, statisticValueWords } from '../../result/number-words.js';
import type { NullSummary, Result } from '../../result/result.js';
import { capital } from '../capital.js';
import { blue, element, ink, label, orange, paper, quiet, quietEdge, textWidth, type Markup } from './element.js';
import { bottomAxis, leftAxis, line, pictureWidth, ticksOf, leftOf, type Picture, type Room } from './frame.js';
import { finiteBins, type DrawnBin } from './finite-bins.js';
import { hatching } from './hatching.js';
import { caption, keyFor, type KeyEntry } from './words.js';

const plotHeight = 140;
/** The observed value may stand this many widths of the law away before an arrow points to it. */
const farAway = 1.5;

/** @param id as of the document: names the hatching. */
export function nullDistribution(result: Result, summary: NullSummary, id: string): Picture {
  const bins = finiteBins(summary);
  const head = caption(captionWords(summary));
  const key = keyFor(keyEntries(result, summary, id), head.bottom);
  const top = key.bottom + 18;
  const highest = max(bins, ({ mass, approximation = 0 }) => Math.max(mass, approximation)) ?? 1;
  const up = scaleLinear([0, highest], [top + plotHeight, top]).nice(4);
  const upTicks = up.ticks(4).map((value) => ({ at: up(value), words: format('.3~g')(value) }));
  const room: Room = {
    left: leftOf(upTicks),
    right: pictureWidth - 12,
    top,
    bottom: top + plotHeight,
  };
  const [low, high] = [bins[0]!.left, bins.at(-1)!.right];
  const observed = observedPlace(summary.observed, low, high);
  const along = scaleLinear([Math.min(low, observed.at), Math.max(high, observed.at)], [room.left, room.right]);
  return {
    title: captionWords(summary),
    description: describe(result, summary),
    height: room.bottom + 36,
    marks: [
      hatching(id),
      ...head.marks,
      ...key.marks,
      ...bins.map((bin) => barOf(bin, along, up, id)),
      ...curveOf(bins, along, up),
      bottomAxis(room, ticksOf(along, 6), shortStatisticWords(summary.statistic)),
      leftAxis(room, upTicks, 'probability'),
      ...observedMark(along(observed.at), observed.far, room, statisticValueWords(summary.observed)),
    ],
  };
}

const captionWords = ({ statistic, method, tables }: NullSummary): string =>
  `${capital(shortStatisticWords(statistic))} by chance alone, ${
    method === 'exact' ? `all ${countWords(tables)} tables` : `${countWords(tables)} random tables`
  } with these margins`;

const describe = (result: Result, summary: NullSummary): string => {
  const tail = summary.bins.reduce((sum, { inTail }) => sum + inTail, 0);
  return `Histogram of the probability of each value of the statistic when rows and columns are unrelated. The observed value is ${statisticValueWords(summary.observed)}. Tables at least as extreme hold ${format('.3~g')(tail)} of the probability drawn here. ${result.sentence}`;
};

function keyEntries(result: Result, { limit, orderedBy, tail }: NullSummary, id: string): KeyEntry[] {
  const p = result.pValues[0]!;
  const box =
    (fill: string, stroke: string): KeyEntry['sample'] =>
    (x, y) =>
      element('rect', { x, y, width: 14, height: 9, fill, stroke, 'stroke-width': 0.6 });
  const doubled = tail === 'both' && (orderedBy === 'upper' || orderedBy === 'lower');
  return [
    { words: 'less extreme than observed', sample: box(quiet, quietEdge) },
    {
      words: `at least as extreme${doubled ? `, in the ${orderedBy} tail, of which p is twice` : ''}${pWords(p)}`,
      sample: box(`url(#${id}-hatching)`, blue),
    },
    ...(limit === undefined
      ? []
      : [
          {
            words:
              limit.law === 'normal'
                ? 'the same by the normal approximation'
                : `the same by the chi-square approximation, ${limit.degreesOfFreedom} df`,
            sample: (x: number, y: number) =>
              element('line', { x1: x, x2: x + 14, y1: y + 4.5, y2: y + 4.5, stroke: orange, 'stroke-width': 2 }),
          },
        ]),
  ];
}

/** The p that the hatched part stands for; that of another law or approximation is not what is drawn. */
const pWords = (p: Result['pValues'][number]): string =>
  p.method === 'exact' || p.method === 'sample' ? `: p ${pNumber(p)}, ${pName(p).replace(/ permutation p\b/, '')}` : '';

function barOf(
  { left, right, mass, inTail }: DrawnBin,
  along: (x: number) => number,
  up: (y: number) => number,
  id: string,
): Markup {
  const bar = (from: number, to: number, name: string, fill: string, stroke: string): Markup =>
    to <= from
      ? ''
      : element('rect', {
          class: `keepsum-${name}`,
          x: along(left) + 0.4,
          y: up(to),
          width: Math.max(0.6, along(right) - along(left) - 0.8),
          height: up(from) - up(to),
          fill,
          stroke,
          'stroke-width': 0.6,
        });
  return bar(0, inTail, 'tail', `url(#${id}-hatching)`, blue) + bar(inTail, mass, 'bulk', quiet, quietEdge);
}

/** Through the middle of each bin that has two ends, at what the limiting law puts there; cased, so that it stands out over bars. */
function curveOf(bins: readonly DrawnBin[], along: (x: number) => number, up: (y: number) => number): Markup[] {
  const closed = bins.filter(({ approximation, isOpen }) => approximation !== undefined && !isOpen);
  if (closed.length < 3) return [];
  const path = lineOf<DrawnBin>()
    .x(({ left, right }) => Math.round(along((left + right) / 2) * 100) / 100)
    .y(({ approximation }) => Math.round(up(approximation!) * 100) / 100)
    .curve(curveNatural)(closed)!;
  return [
    element('path', { class: 'keepsum-casing', d: path, fill: 'none', stroke: paper, 'stroke-width': 3.4 }),
    element('path', { class: 'keepsum-curve', d: path, fill: 'none', stroke: orange, 'stroke-width': 1.8 }),
  ];
}

interface ObservedPlace {
  readonly at: number;
  /** Too far away to be drawn where it is: to this side. */
  readonly far?: 'left' | 'right';
}

function observedPlace(observed: NullSummary['observed'], low: number, high: number): ObservedPlace {
  const reach = farAway * (high - low);
  if (observed === 'infinity' || (typeof observed === 'number' && observed > high + reach)) {
    return { at: high + reach / 10, far: 'right' };
  }
  if (observed === '-infinity' || observed < low - reach) return { at: low - reach / 10, far: 'left' };
  return { at: observed };
}

/** A dashed line down the plot with a triangle on top, its words beside it where there is room. */
function observedMark(
  x: number,
  far: ObservedPlace['far'],
  { top, bottom, left, right }: Room,
  value: string,
): Markup[] {
  const words = far === undefined ? `observed ${value}` : `observed ${value}, far to the ${far}`;
  const half = textWidth(words) / 2;
  const middle = Math.min(right - half, Math.max(left + half, x));
  const tip = { left: 'l6 -3.5v7z', right: 'l-6 -3.5v7z' };
  const at = (y: number): string => `M${x.toFixed(2)} ${y.toFixed(2)}`;
  return [
    line(x, top - 4, x, bottom, { class: 'keepsum-observed', 'stroke-width': 1.4, 'stroke-dasharray': '4 2' }),
    element('path', {
      class: 'keepsum-ink',
      d: far === undefined ? `${at(top + 1)}l-3.5 -6h7z` : `${at(top - 1)}${tip[far]}`,
      fill: ink,
    }),
    label(middle, top - 8, words, { 'text-anchor': 'middle', 'font-weight': 'bold' }),
  ];
}
