// 3 x 3 tables with too many forms to count each: their classes by two inner cells, weighed by listing all tables in doubles.
import type { Forced } from '../../../../src/null/sampled/draw-plan.js';
import { planDraws } from '../../../../src/null/sampled/draw-plan.js';
import { prepareSampler } from '../../../../src/null/sampled/sample-cuts.js';
import { logFactorial } from '../../../../src/numeric/log-factorial.js';
import type { UniformSource } from '../../../../src/random/stream.js';
import { liveFrom } from '../../../helpers/tables.js';
import { cornerTable } from '../../../helpers/margins.js';
import { fit } from './fit.js';

export interface SquareCase {
  readonly claim: string;
  readonly rows: readonly [number, number, number];
  readonly columns: readonly [number, number, number];
  readonly forced?: Forced;
  /** What the plan must choose for the inner cell. */
  readonly inner: string;
}

const margins = { rows: [60, 66, 74], columns: [62, 68, 70] } as const;

/** A variance of 9 and more in the inner cell. */
const larger = { rows: [102, 112, 126], columns: [105, 116, 119] } as const;

export const squares: readonly SquareCase[] = [
  { claim: 'inner cell by trial', ...margins, forced: { prefer: 'trial' }, inner: 'trial' },
  {
    claim: 'inner cell by trial with a short reach',
    ...margins,
    forced: { prefer: 'trial', reach: 0.3 },
    inner: 'trial',
  },
  { claim: 'inner cell by rejection', ...larger, forced: { prefer: 'rejection' }, inner: 'rejection' },
  { claim: 'inner cell by inversion', ...margins, forced: { prefer: 'inversion' }, inner: 'inversion' },
  { claim: 'inner cell as chosen', rows: [50, 56, 94], columns: [52, 60, 88], inner: 'trial' },
];

const cut = 3;

/** Classes: three counts wide, by cells (0, 0) and (1, 1). */
export function fitOfSquare(
  { rows, columns, forced, inner }: SquareCase,
  source: UniformSource,
  draws: number,
): number {
  const live = liveFrom(cornerTable(rows, columns));
  const chosen = planDraws(live, forced).cells[1]?.[1]?.sampler;
  if (chosen !== inner) throw new Error(`the inner cell is drawn by ${String(chosen)}`);
  const side = Math.ceil((Math.max(...rows) + 1) / cut);
  const classOf = (first: number, second: number): number => Math.floor(first / cut) * side + Math.floor(second / cut);
  const weights = new Float64Array(side * side);
  const logs = Float64Array.from({ length: Math.max(...rows, ...columns) + 1 }, (_, n) => logFactorial(n));
  const [r0, r1] = rows;
  const [c0, c1, c2] = columns;
  const log = (n: number): number => logs[n]!;
  const likeliest = 9 * logFactorial(Math.round((r0 + r1 + rows[2]) / 9));
  for (let a = 0; a <= Math.min(r0, c0); a++) {
    for (let b = 0; b <= Math.min(r0 - a, c1); b++) {
      const first = log(a) + log(b) + log(r0 - a - b) - likeliest;
      for (let c = 0; c <= Math.min(r1, c0 - a); c++) {
        for (let d = 0; d <= Math.min(r1 - c, c1 - b); d++) {
          const e = r1 - c - d;
          const last = c2 - (r0 - a - b) - e;
          if (last < 0) continue;
          const rest = log(c) + log(d) + log(e) + log(c0 - a - c) + log(c1 - b - d) + log(last);
          weights[classOf(a, d)]! += Math.exp(-first - rest);
        }
      }
    }
  }
  const all = weights.reduce((sum, weight) => sum + weight, 0);
  const observed = new Float64Array(side * side);
  const sampler = prepareSampler(live, [], forced);
  const table = new Float64Array(9);
  for (let draw = 0; draw < draws; draw++) {
    sampler.drawTable(source, table);
    observed[classOf(table[0]!, table[4]!)]!++;
  }
  return fit(
    weights.map((weight) => weight / all),
    observed,
  );
}
