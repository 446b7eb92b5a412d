// Which margins each sampler of whole tables is tried on, and each switch between samplers.
import type { Forced, Sampler } from '../../../../src/null/sampled/draw-plan.js';

export interface TableCase {
  readonly claim: string;
  readonly rows: readonly number[];
  readonly columns: readonly number[];
  readonly forced?: Forced;
  /** What the plan must hold, so that the case tests what it says. */
  readonly uses: readonly Sampler[];
}

const square = { rows: [4, 5, 6], columns: [3, 5, 7] };
const flat = { rows: [6, 8], columns: [2, 3, 4, 5] };
const tall = { rows: [2, 3, 3, 4], columns: [3, 4, 5] };
const larger = { rows: [9, 11, 13], columns: [8, 10, 15] };
const lopsided = { rows: [2, 3, 60], columns: [5, 10, 50] };

const wide = { rows: [3, 4, 69_993], columns: [20_000, 22_000, 28_000] };
const wider = { rows: [4, 5, 2 ** 33], columns: [2 ** 31, 3 * 2 ** 31 + 9] };
const widest = { rows: [3, 4, 2 ** 53 - 9], columns: [2 ** 51, 2 ** 51 + 4, 2 ** 52 - 6] };

const forcedOn = (prefer: 'labels' | 'guide' | 'trial' | 'inversion'): TableCase[] =>
  Object.entries({ square, flat, tall, larger, lopsided }).map(([shape, margins]) => ({
    claim: `${prefer}, ${shape}`,
    ...margins,
    forced: { prefer },
    uses: [prefer],
  }));

/** Look-up tables that hardly reach past the expected counts: most tables then need a cell from beyond them. */
const shortReach = (['guide', 'trial'] as const).flatMap((prefer): TableCase[] => [
  { claim: `${prefer} with a short reach, larger`, ...larger, forced: { prefer, reach: -1 }, uses: [prefer] },
  { claim: `${prefer} with a short reach, tall`, ...tall, forced: { prefer, reach: -0.6 }, uses: [prefer] },
]);

export const tableCases: readonly TableCase[] = [
  ...forcedOn('labels'),
  ...forcedOn('guide'),
  ...forcedOn('trial'),
  ...forcedOn('inversion'),
  ...shortReach,
  { claim: 'as chosen: guides, then a trial', rows: [14, 16, 36], columns: [14, 18, 34], uses: ['guide', 'trial'] },
  {
    claim: 'rejection, 2x2',
    rows: [90, 110],
    columns: [80, 120],
    forced: { prefer: 'rejection' },
    uses: ['rejection'],
  },
  {
    claim: 'rejection, 2x3',
    rows: [120, 140],
    columns: [72, 80, 108],
    forced: { prefer: 'rejection' },
    uses: ['rejection'],
  },
  {
    claim: 'labels searched for',
    rows: [3, 4, 400],
    columns: [100, 120, 187],
    forced: { prefer: 'labels' },
    uses: ['labels'],
  },
  {
    claim: 'as chosen: a row of labels, then a guide and a trial',
    rows: [1, 14, 20],
    columns: [9, 12, 14],
    uses: ['labels', 'trial'],
  },
  ...(['labels', 'guide', 'inversion'] as const).flatMap((prefer): TableCase[] => [
    { claim: `${prefer}, a wide total`, ...wide, forced: { prefer }, uses: [prefer] },
    { claim: `${prefer}, a total above 2^31`, ...wider, forced: { prefer }, uses: [prefer] },
    { claim: `${prefer}, a total of almost 2^53`, ...widest, forced: { prefer }, uses: [prefer] },
  ]),
];
