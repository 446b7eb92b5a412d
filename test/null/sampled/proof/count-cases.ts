// Which hypergeometric laws the generators of single counts are tried on, far beyond tables that can be listed.
import { invert } from '../../../../src/null/sampled/hypergeometric/inversion.js';
import { HypergeometricMass } from '../../../../src/null/sampled/hypergeometric/mass.js';
import { reject } from '../../../../src/null/sampled/hypergeometric/rejection.js';
import type { UniformSource } from '../../../../src/random/stream.js';
import { fit } from './fit.js';

export interface CountCase {
  readonly sampler: 'inversion' | 'rejection';
  readonly total: number;
  readonly marked: number;
  readonly drawn: number;
}

export const countCases: readonly CountCase[] = [
  { sampler: 'inversion', total: 20, marked: 8, drawn: 9 },
  { sampler: 'inversion', total: 2000, marked: 700, drawn: 400 },
  { sampler: 'inversion', total: 60_000, marked: 300, drawn: 900 },
  { sampler: 'inversion', total: 10_000_000, marked: 4000, drawn: 9000 },
  { sampler: 'inversion', total: 2 ** 52, marked: 2 ** 51, drawn: 40 },
  { sampler: 'rejection', total: 160, marked: 70, drawn: 80 },
  { sampler: 'rejection', total: 60_000, marked: 400, drawn: 1600 },
  { sampler: 'rejection', total: 60_000, marked: 59_600, drawn: 1600 },
  { sampler: 'rejection', total: 60_000, marked: 30_000, drawn: 20_000 },
  { sampler: 'rejection', total: 1_000_000, marked: 300_000, drawn: 999_000 },
  { sampler: 'rejection', total: 2 ** 31, marked: 2 ** 30, drawn: 700_000_000 },
  { sampler: 'rejection', total: 2 ** 40, marked: 2 ** 36, drawn: 2 ** 39 },
  { sampler: 'rejection', total: 2 ** 53 - 1, marked: 2 ** 52, drawn: 2 ** 51 },
  { sampler: 'rejection', total: 2 ** 53 - 1, marked: 2 ** 53 - 2 ** 20, drawn: 2 ** 52 },
];

/** Fit of the counts over classes 1/25 of a deviation wide (or single counts), and of their remainders by 4. */
export function fitOfCounts(
  { sampler, total, marked, drawn }: CountCase,
  source: UniformSource,
  draws: number,
): number[] {
  const mass = new HypergeometricMass(total);
  const deviation = Math.sqrt((drawn * (marked / total) * (1 - marked / total) * (total - drawn)) / (total - 1));
  const mode = Math.floor((drawn + 1) * ((marked + 1) / (total + 2)));
  const width = Math.max(1, Math.round(deviation / 25));
  const classes = 2 * Math.ceil((9 * deviation) / width + 12) + 1;
  const middle = (classes - 1) / 2;
  const observed = new Float64Array(classes);
  const byRemainder = new Float64Array(4);
  for (let draw = 0; draw < draws; draw++) {
    const count =
      sampler === 'inversion'
        ? invert(source, source.word(), mass, total, marked, drawn)
        : reject(source, mass, total, marked, drawn);
    // Class k holds mode + (k - middle) width and the width - 1 counts after it.
    observed[Math.floor((count - mode) / width) + middle]!++;
    byRemainder[(count - mode) & 3]!++;
  }
  const weight = (k: number): number => {
    const start = (k - middle) * width;
    const logRatio = (d: number): number => logOfRatio(total, marked, drawn, mode, d);
    if (width <= 64) return sum(width, (i) => Math.exp(logRatio(start + i)));
    // Counts from start to start + width - 1 are the stretch half a unit wider on both sides; by Simpson's rule.
    const steps = 16;
    const step = width / steps;
    return (
      (step / 3) *
      sum(
        steps + 1,
        (i) => (i === 0 || i === steps ? 1 : i % 2 === 1 ? 4 : 2) * Math.exp(logRatio(start - 0.5 + i * step)),
      )
    );
  };
  const weights = Float64Array.from({ length: classes }, (_, k) => weight(k));
  const all = weights.reduce((a, b) => a + b, 0);
  const fits = [
    fit(
      weights.map((w) => w / all),
      observed,
    ),
  ];
  if (width > 1) fits.push(fit([0.25, 0.25, 0.25, 0.25], byRemainder));
  return fits;
}

const sum = (length: number, term: (i: number) => number): number => {
  let total = 0;
  for (let i = 0; i < length; i++) total += term(i);
  return total;
};

/** ln of P(mode + d) / P(mode), by differences of Stirling's series that do not cancel; -Infinity outside the support. */
function logOfRatio(total: number, marked: number, drawn: number, mode: number, d: number): number {
  const cells = [mode, marked - mode, drawn - mode, total - marked - drawn + mode] as const;
  const signs = [1, -1, -1, 1];
  if (cells.some((cell, k) => cell + signs[k]! * d < 0)) return -Infinity;
  if (cells.some((cell) => cell < 1000)) return exactLogOfRatio(cells, d);
  const growth = d * Math.log((cells[1] / cells[0]) * (cells[2] / cells[3]));
  return growth - cells.reduce((sum, cell, k) => sum + logFactorialStep(cell, signs[k]! * d), 0);
}

/** ln (m + d)!/m! less d ln m. */
const logFactorialStep = (m: number, d: number): number =>
  (m + d + 0.5) * Math.log1p(d / m) - d + 1 / (12 * (m + d)) - 1 / (12 * m);

/** The same by multiplying neighbours' ratios, for whole d. */
function exactLogOfRatio([a, b, c, e]: readonly [number, number, number, number], d: number): number {
  let sum = 0;
  for (let k = 0; k < d; k++) sum += Math.log(((b - k) * (c - k)) / ((a + k + 1) * (e + k + 1)));
  for (let k = 0; k < -d; k++) sum += Math.log(((a - k) * (e - k)) / ((b + k + 1) * (c + k + 1)));
  return sum;
}
