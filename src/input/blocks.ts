// Several tables in one file are strata. The rule: blank lines part a file into blocks when
//   - every block begins with a line that holds one name only (the label of the stratum), or
//   - every block begins with the same line (the header, repeated), or
//   - the user says that there are strata (`--strata NAME`).
// In every other file blank lines are passed over, and it is one table. No file that could be read as one table becomes strata by
// itself: a line of one name, or a second header, is no row of counts.
import { dataProblem } from '../problem/problem.js';
import { isMissingText, isNumberLike } from './count-text.js';
import type { Line } from './rectangle.js';
import { sameStratum } from './strata.js';

export interface Block {
  readonly label: string;
  readonly lines: readonly Line[];
}

/** @returns undefined for one table. @throws Problem (data): `one-block`, `same-stratum`, `empty-block` */
export function blocksOf(lines: readonly Line[], asked: boolean, place: string): Block[] | undefined {
  const parts = partsOf(lines);
  if (parts.length < 2) {
    if (asked) throw oneBlock(place);
    return undefined;
  }
  const named = parts.every(([first]) => isName(first!));
  const headed = parts.every(([first]) => !isName(first!) && isSame(first!, parts[0]![0]!) && isHeader(first!));
  if (!named && !headed && !asked) return undefined;
  const blocks = parts.map((part, k) =>
    isName(part[0]!) ? { label: nameOf(part[0]!), lines: part.slice(1) } : { label: `stratum ${k + 1}`, lines: part },
  );
  blocks.forEach(({ label, lines: own }, k) => {
    if (blocks.findIndex((one) => one.label === label) !== k) throw sameStratum(label, place);
    if (own.length === 0) throw emptyBlock(label, place);
  });
  return blocks;
}

function partsOf(lines: readonly Line[]): Line[][] {
  const parts: Line[][] = [];
  lines.forEach((line, k) => {
    if (k === 0 || line.part !== lines[k - 1]!.part) parts.push([]);
    parts.at(-1)!.push(line);
  });
  return parts;
}

const filled = ({ fields }: Line): string[] => fields.filter((field) => field.trim() !== '');

/** One value, in the first place, that is text. */
const isName = (line: Line): boolean => {
  const [name, ...others] = filled(line);
  return others.length === 0 && line.fields[0]!.trim() === name?.trim() && !isNumberLike(name) && !isMissingText(name);
};

const nameOf = (line: Line): string => line.fields[0]!.trim();

const isHeader = (line: Line): boolean => filled(line).every((field) => !isNumberLike(field));

const isSame = (one: Line, other: Line): boolean =>
  filled(one).length === filled(other).length &&
  one.fields.every((field, k) => field.trim() === (other.fields[k] ?? '').trim());

const oneBlock = (place: string) =>
  dataProblem({
    code: 'one-block',
    message: 'there is one table only, where strata were asked for',
    place,
    hint: 'part the tables by blank lines; of raw records, name the columns too: --rows COLUMN --columns COLUMN --strata COLUMN',
  });

const emptyBlock = (label: string, place: string) =>
  dataProblem({
    code: 'empty-block',
    message: `there are no counts below "${label}"`,
    place,
    hint: 'put the table of a stratum right below its label, without a blank line between',
  });
