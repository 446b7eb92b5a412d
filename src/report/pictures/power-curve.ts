// The power of a planned study over its size: one point for each size asked for, joined; intervals where it was simulated.
import { extent } from 'd3-array';
import { scaleLinear } from 'd3-scale';
import { line as lineOf } from 'd3-shape';
import { digits } from '../../result/number-words.js';
import type { PowerAnswer, PowerResult } from '../../result/power-declaration.js';
import { powerNumber, sizesWords, testName } from '../../result/power-words.js';
import { blue, element, ink, orange, paper, type Markup } from './element.js';
import {
  bottomAxis,
  leftAxis,
  leftOf,
  line,
  pictureWidth,
  svgDocument,
  ticksOf,
  type Picture,
  type Room,
} from './frame.js';
import { caption, keyFor, type KeyEntry } from './words.js';

const plotHeight = 150;
const minorTicks = 5;

/** What keeps a result from having a curve; undefined where it has one. */
export const lackOfCurve = ({ answers }: PowerResult): string | undefined =>
  new Set(answers.map(({ total }) => total)).size > 1 ? undefined : 'a curve takes two sizes or more';

/** @throws TypeError where `lackOfCurve` says why there is none. */
export function drawPowerCurve(result: PowerResult, id = 'keepsum-power'): string {
  const lack = lackOfCurve(result);
  if (lack !== undefined) throw new TypeError(lack);
  return svgDocument(powerCurve(result), id);
}

function powerCurve({ plan, answers, sentence }: PowerResult): Picture {
  const sorted = [...answers].sort((a, b) => a.total - b.total);
  const head = caption(`Power: ${testName(plan)}, alpha ${plan.alpha}`);
  const key = keyFor(keyEntries(plan.wanted, sorted), head.bottom);
  const top = key.bottom + 8;
  const up = scaleLinear([0, 1], [top + plotHeight, top]);
  const upTicks = ticksOf(up, minorTicks, 'up');
  const room: Room = { left: leftOf(upTicks), right: pictureWidth - 16, top, bottom: top + plotHeight };
  const [least, most] = extent(sorted, ({ total }) => total) as [number, number];
  const along = scaleLinear([least, most], [room.left + 8, room.right - 4]);
  const place = ({ total, power }: PowerAnswer): [number, number] => [along(total), up(power)];
  const path = lineOf<PowerAnswer>()
    .x((answer) => Math.round(along(answer.total) * 100) / 100)
    .y((answer) => Math.round(up(answer.power) * 100) / 100)(sorted)!;
  return {
    title: `Power of the planned study over its size`,
    description: `${sentence} ${sorted.map((answer) => `${sizesWords(plan, answer)}: ${powerNumber(answer)}`).join('; ')}.`,
    height: room.bottom + 36,
    marks: [
      ...head.marks,
      ...key.marks,
      bottomAxis(room, ticksOf(along, 6), 'units in all groups together'),
      leftAxis(room, upTicks, 'power'),
      ...(plan.wanted === undefined ? [] : [wantedLine(room, up(plan.wanted))]),
      element('path', { class: 'keepsum-curve', d: path, fill: 'none', stroke: blue, 'stroke-width': 1.6 }),
      ...sorted.flatMap((answer) => [...whisker(answer, along, up), point(...place(answer))]),
    ],
  };
}

const wantedLine = ({ left, right }: Room, y: number): Markup =>
  line(left, y, right, y, { class: 'keepsum-wanted', stroke: orange, 'stroke-width': 1.4, 'stroke-dasharray': '5 3' });

const point = (x: number, y: number): Markup =>
  element('circle', { class: 'keepsum-point', cx: x, cy: y, r: 2.6, fill: paper, stroke: blue, 'stroke-width': 1.6 });

function whisker({ total, error }: PowerAnswer, along: (x: number) => number, up: (y: number) => number): Markup[] {
  if (error.kind !== 'sampling') return [];
  const [low, high] = error.interval;
  const x = along(total);
  return [
    line(x, up(low), x, up(high), { class: 'keepsum-interval' }),
    line(x - 3, up(low), x + 3, up(low)),
    line(x - 3, up(high), x + 3, up(high)),
  ];
}

function keyEntries(wanted: number | undefined, [first]: readonly PowerAnswer[]): KeyEntry[] {
  const error = first!.error;
  const stroke =
    (colour: string, dashes?: string): KeyEntry['sample'] =>
    (x, y) =>
      element('line', {
        x1: x,
        x2: x + 14,
        y1: y + 4.5,
        y2: y + 4.5,
        stroke: colour,
        'stroke-width': 1.6,
        'stroke-dasharray': dashes,
      });
  return [
    {
      words: error.kind === 'sampling' ? 'simulated, one point a size' : 'exact, one point a size',
      sample: (x, y) => stroke(blue)(x, y) + point(x + 7, y + 4.5),
    },
    ...(error.kind === 'sampling'
      ? [
          {
            words: `interval of ${digits(error.confidence * 100, 2)}% around a simulated one`,
            sample: (x: number, y: number) =>
              element('path', {
                class: 'keepsum-line',
                d: `M${x + 4} ${y}h6m-3 0v9m-3 0h6`,
                fill: 'none',
                stroke: ink,
              }),
          },
        ]
      : []),
    ...(wanted === undefined ? [] : [{ words: `wanted: ${wanted}`, sample: stroke(orange, '5 3') }]),
  ];
}
