// Turns the cells that hold no count into one problem: all of them under one heading, the first five with their places.
import type { Problem } from '../problem/problem.js';
import { dataProblem } from '../problem/problem.js';
import type { CountFault, CountOrigin } from './count-text.js';
import { parseCount } from './count-text.js';
import { shownValue } from './shown-value.js';

/** How many cells a message lists. */
export const mostListed = 5;

export interface BadCell {
  readonly text: string;
  readonly place: string;
  readonly fault: CountFault;
}

/** A cell whose text is no count, or undefined. The place is asked for only then: finding it may mean reading again. */
export function badCell(text: string, origin: CountOrigin, place: () => string): BadCell | undefined {
  const count = parseCount(text, origin);
  return typeof count === 'number' ? undefined : { text, place: place(), fault: count };
}

const described = ({ text, fault }: BadCell): string =>
  text.trim() === '' ? `an empty cell where a count belongs` : `${shownValue(text.trim())} ${fault.what}`;

/**
 * @param bad the first five bad cells, or as many as there are, in reading order
 * @param all how many there are
 * @param source its name is said once, before the message, and not again in the list
 */
export function countProblem(bad: readonly BadCell[], all: number, source?: string): Problem {
  const first = bad[0]!;
  if (all === 1) {
    return dataProblem({
      code: first.fault.code,
      message: described(first),
      place: first.place,
      hint: first.fault.hint,
    });
  }
  const short = (place: string): string =>
    source !== undefined && place.startsWith(`${source}:`) ? place.slice(source.length + 1) : place;
  const listed = bad.slice(0, mostListed).map((cell) => `${described(cell)} (${short(cell.place)})`);
  const more = all > listed.length ? ` and ${all - listed.length} more` : '';
  const sameCode = bad.every((cell) => cell.fault.code === first.fault.code);
  return dataProblem({
    code: sameCode ? first.fault.code : 'bad-counts',
    message: `${all} cells hold no count: ${listed.join('; ')}${more}`,
    place: first.place,
    hint: first.fault.hint,
  });
}
