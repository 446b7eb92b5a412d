// The odds ratio of each stratum with its interval, the larger strata as larger squares, the common one as a diamond below.
import { extent, max } from 'd3-array';
import { format } from 'd3-format';
import { scaleLog } from 'd3-scale';
import { digits } from '../../result/number-words.js';
import type { Effect, Result } from '../../result/result.js';
import { blue, cutToWidth, element, ink, label, quietEdge, textWidth, type Markup } from './element.js';
import { bottomAxis, line, pictureWidth, type Picture, type Room, type Tick } from './frame.js';
import { caption } from './words.js';

const rowHeight = 17;
const widestLabel = 96;
/** Odds ratios further out are drawn at the end of the axis, with an arrow. */
const furthest = 1000;
export const mostStrata = 60;

type Value = number | 'infinity' | '-infinity' | null;

interface Row {
  readonly label: string;
  readonly value: Value;
  readonly interval: readonly [Value, Value] | null;
  /** Half the side of its square; undefined: the common one, a diamond. */
  readonly half?: number;
}

const commonNames: Readonly<Record<string, string>> = {
  'conditional-odds-ratio': 'common, exact',
  'mantel-haenszel-odds-ratio': 'common, Mantel-Haenszel',
};

const commonOf = ({ effects = [] }: Result): Effect | undefined =>
  Object.keys(commonNames)
    .map((name) => effects.find((effect) => effect.name === name))
    .find((effect) => effect !== undefined);

/** For a result whose strata have odds ratios. */
export function forest(result: Result): Picture {
  const rows = rowsOf(result);
  const head = caption(`Odds ratio in each stratum, ${digits(result.plan.confidence * 100, 2)}% intervals`);
  const left = 16 + Math.min(widestLabel, Math.max(...rows.map((row) => textWidth(row.label))));
  const valuesWide = Math.max(...rows.map(({ value }) => textWidth(valueWords(value))));
  const room: Room = {
    left,
    right: pictureWidth - 14 - valuesWide,
    top: head.bottom,
    bottom: head.bottom + rowHeight * rows.length + 6,
  };
  const along = scaleFor(rows, room);
  return {
    title: 'Odds ratios of the strata',
    description: `${rows.map(rowWords).join('; ')}. ${result.sentence}`,
    height: room.bottom + 36,
    marks: [
      ...head.marks,
      line(along(1), room.top, along(1), room.bottom, {
        class: 'keepsum-one',
        stroke: quietEdge,
        'stroke-dasharray': '3 2',
      }),
      ...rows.flatMap((row, k) => rowMarks(row, room.top + (k + 0.5) * rowHeight + 2, along, room)),
      bottomAxis(room, ticksFor(along), 'odds ratio, on a logarithmic scale'),
    ],
  };
}

function rowsOf(result: Result): Row[] {
  const { labels, totals, oddsRatios, oddsRatioIntervals } = result.strata!;
  const largest = max(totals) || 1;
  const common = commonOf(result);
  const limits = common?.intervals[0];
  return [
    ...labels.map((words, s) => ({
      label: words.trim() === '' ? '(blank)' : words,
      value: oddsRatios![s]!,
      interval: oddsRatioIntervals?.[s] ?? null,
      half: 1.8 + 3.2 * Math.sqrt(totals[s]! / largest),
    })),
    ...(common === undefined
      ? []
      : [
          {
            label: commonNames[common.name]!,
            value: common.estimate,
            interval: limits === undefined ? null : ([limits.lower, limits.upper] as const),
          },
        ]),
  ];
}

const valueWords = (value: Value): string =>
  value === null ? 'none' : typeof value === 'number' ? digits(value, 3) : 'infinite';

const rowWords = ({ label: words, value, interval }: Row): string =>
  `${words}: ${valueWords(value)}${interval === null ? '' : ` (${interval.map(valueWords).join(' to ')})`}`;

const finite = (value: Value): value is number => typeof value === 'number' && value > 0;

type Along = ReturnType<typeof scaleLog<number, number>>;

function scaleFor(rows: readonly Row[], { left, right }: Room): Along {
  const seen = rows.flatMap(({ value, interval }) => [value, ...(interval ?? [])]).filter(finite);
  const [low, high] = extent([1 / 1.5, 1.5, ...seen.map((each) => Math.min(furthest, Math.max(1 / furthest, each)))]);
  return scaleLog([low! / 1.15, high! * 1.15], [left + 6, right - 6]).clamp(true);
}

/** Powers of ten, and 2 and 5 between them where there is room. */
function ticksFor(along: Along): Tick[] {
  const [low, high] = along.domain() as [number, number];
  const wanted = high / low > 2000 ? [1] : high / low > 60 ? [1, 3] : [1, 2, 5];
  const write = format('~r');
  return Array.from({ length: 9 }, (_, k) => 10 ** (k - 4))
    .flatMap((power) => wanted.map((digit) => digit * power))
    .filter((value) => value >= low && value <= high)
    .map((value) => ({ at: along(value), words: write(Number(value.toPrecision(3))) }));
}

function rowMarks(row: Row, y: number, along: Along, { left, right }: Room): Markup[] {
  const at = (value: Value): number =>
    value === 'infinity' ? right - 6 : value === null || value === '-infinity' || value === 0 ? left + 6 : along(value);
  const [low, high] = row.interval ?? [null, null];
  const isCommon = row.half === undefined;
  return [
    label(left - 6, y + 3.5, cutToWidth(row.label, left - 12), {
      'text-anchor': 'end',
      ...(isCommon ? { 'font-weight': 'bold' } : {}),
    }),
    ...(row.interval === null
      ? []
      : [line(at(low), y, at(high), y, { class: 'keepsum-interval', 'stroke-width': 1.2 }), ...ends(low, high, y, at)]),
    ...(row.value === null ? [] : [valueMark(row.value, row.half, y, at(row.value))]),
    label(pictureWidth - 8, y + 3.5, valueWords(row.value), {
      'text-anchor': 'end',
      ...(isCommon ? { 'font-weight': 'bold' } : {}),
    }),
  ];
}

/** A bar at a limit that is shown, an arrow at one that lies beyond the axis. */
const ends = (low: Value, high: Value, y: number, at: (value: Value) => number): Markup[] =>
  [low, high].map((limit, k) => {
    const beyond = !finite(limit) || limit > furthest || limit < 1 / furthest;
    if (!beyond) return line(at(limit), y - 3, at(limit), y + 3);
    const back = k === 0 ? 5 : -5;
    return element('path', { class: 'keepsum-ink', d: `M${at(limit).toFixed(2)} ${y}l${back} -3v6z`, fill: ink });
  });

function valueMark(value: Value, half: number | undefined, y: number, x: number): Markup {
  if (half === undefined) return diamond(x, y);
  return finite(value) ? square(x, y, half) : beyondMark(x, y, value === 'infinity' ? 'right' : 'left');
}

/** A ratio of 0 or infinity lies beyond every axis. */
const beyondMark = (x: number, y: number, side: 'left' | 'right'): Markup =>
  element('path', {
    class: 'keepsum-beyond',
    d: `M${x.toFixed(2)} ${y.toFixed(2)}l${side === 'right' ? -8 : 8} -4.5v9z`,
    fill: blue,
  });

const square = (x: number, y: number, half: number): Markup =>
  element('rect', {
    class: 'keepsum-stratum',
    x: x - half,
    y: y - half,
    width: 2 * half,
    height: 2 * half,
    fill: blue,
  });

const diamond = (x: number, y: number): Markup =>
  element('path', {
    class: 'keepsum-ink keepsum-common',
    d: `M${(x - 6).toFixed(2)} ${y.toFixed(2)}l6 -5l6 5l-6 5z`,
    fill: ink,
  });
