// Numbers as a report prints them: a p never shows more digits than its own error allows, a tiny one keeps its size, and
// none is printed as 0 when it is not. All digits stay in the json format.

import { groupedDigits } from '../numeric/digit-groups.js';

/** A whole number with its thousands set apart, e.g. 100,000. */
export const countWords = groupedDigits;

/** A number to some significant digits, plain from 0.0001 to a million, else like 3.1e-12. */
export function digits(value: number, significant: number): string {
  const text = value.toPrecision(significant);
  const size = Math.abs(value);
  if (size !== 0 && size < 1e-4) return value.toExponential(significant - 1);
  if (!text.includes('e')) return size < 1000 ? text : countWords(Number(text));
  return size < 1e6 ? countWords(Number(text)) : value.toExponential(significant - 1).replace('e+', 'e');
}

/** An exact or approximate probability: three significant digits, two below 0.0001 (3.1e-12). Exactly 0 and 1 stay bare, and nothing else is shown as 1. */
export function probabilityWords(p: number): string {
  if (p === 0 || p === 1) return String(p);
  return p < 1e-4 ? digits(p, 2) : notQuiteOne(p, digits(p, 3));
}

/** A p below the smallest double, known by its logarithm only. */
export const tinyWords = (log10P: number): string => `about 10^${log10P.toFixed(1)}`;

/**
 * A number that is known up to an error: its last digit stands no lower than the error's first one, and at most three
 * significant digits are shown. One digit always stays.
 */
export function roundedTo(error: number, value: number): string {
  if (value === 0 || value === 1) return String(value);
  const place = firstPlace(value);
  const significant = error > 0 ? Math.min(3, Math.max(1, place - roundedPlace(error) + 1)) : 1;
  if (value < 1e-4) return value.toExponential(significant - 1);
  const text = value.toFixed(Math.max(0, significant - 1 - place));
  return significant === 3 ? notQuiteOne(value, text) : text;
}

/** A probability so near 1 that three digits would say 1. */
const notQuiteOne = (value: number, text: string): string =>
  value >= 0.9995 && value < 1 && Number(text) === 1 ? 'above 0.999' : text;

/** Two limits with as many digits as tell them apart, rounded outwards: "0.24131 to 0.24142". */
export function bracketWords(lower: number, upper: number): string {
  if (lower === upper) return `${digits(lower, 12)} to ${digits(upper, 12)}`;
  const apart = Math.ceil(-Math.log10((upper - lower) / upper));
  const significant = Math.max(2, Math.min(15, apart + 2));
  return `${outward(lower, significant, -1)} to ${outward(upper, significant, 1)}`;
}

/** To so many digits, never on the inner side. */
function outward(value: number, significant: number, direction: 1 | -1): string {
  if (value === 0 || value === 1) return String(value);
  const rounded = Number(value.toPrecision(significant));
  const unit = 10 ** (Math.floor(Math.log10(value)) - significant + 1);
  const moved = direction * (rounded - value) < 0 ? rounded + direction * unit : rounded;
  return digits(Math.max(0, Math.min(1, moved)), significant);
}

/** Power of ten of the first significant digit. */
const firstPlace = (value: number): number => Number(value.toExponential().split('e')[1]);

/** The same once rounded to that digit: an error of 0.0096 is one of 0.01. */
const roundedPlace = (error: number): number => Number(error.toExponential(0).split('e')[1]);

/** A statistic: four significant digits, or the word for an infinite one. */
export function statisticValueWords(value: number | 'infinity' | '-infinity'): string {
  if (value === 'infinity') return 'infinite';
  if (value === '-infinity') return 'minus infinity';
  return value === 0 ? '0' : digits(value, 4);
}

/** A share of a whole as a percentage: one decimal, more only where 0% or 100% would be untrue. */
export function percentWords(share: number): string {
  return `${percentNumber(share * 100, Math.min(share, 1 - share) * 100)}%`;
}

/** A difference of two shares, signed, in percentage points. */
export const pointsWords = (difference: number): string =>
  `${percentNumber(difference * 100, Math.abs(difference) * 100)} percentage points`;

function percentNumber(percent: number, distanceFromEnd: number): string {
  const decimals = distanceFromEnd === 0 ? 0 : Math.max(1, 1 - Math.floor(Math.log10(distanceFromEnd)));
  return percent
    .toFixed(Math.min(decimals, 20))
    .replace(/(\.\d*?)0+$/, '$1')
    .replace(/\.$/, '');
}

/** A level such as 0.99 as 99%. */
export const levelWords = (level: number): string => `${Number((level * 100).toPrecision(10))}%`;
