// How changes of levels are written: `[rows:|columns:]new=a+b` to merge, `[rows:|columns:]a,b` to keep or to drop. A label that
// holds one of these marks stands in double quotes, a double quote in it is doubled.
import { usageProblem, type Problem } from '../problem/problem.js';
import { shownValue } from './shown-value.js';

export interface LevelWishes {
  /** Each `[rows:|columns:]new=a+b`. Merges come first, in the order given. */
  readonly merge?: readonly string[] | undefined;
  /** Each `[rows:|columns:]a,b`: the levels of that side to keep, once merged. */
  readonly keep?: readonly string[] | undefined;
  /** Likewise, the levels to leave out. */
  readonly drop?: readonly string[] | undefined;
}

export type LevelSide = 'rows' | 'columns';

export interface LevelWish {
  readonly option: '--merge' | '--keep' | '--drop';
  /** As written. */
  readonly text: string;
  /** Left out where the labels tell. */
  readonly side: LevelSide | undefined;
  /** Of a merge: the new level. */
  readonly into: string | undefined;
  readonly labels: readonly string[];
}

/** In the order in which they act. @throws Problem (usage): `bad-merge`, `empty-label`, `duplicate-label`. */
export const readWishes = ({ merge = [], keep = [], drop = [] }: LevelWishes): LevelWish[] => [
  ...merge.map(readMerge),
  ...keep.map((text) => readList(text, '--keep')),
  ...drop.map((text) => readList(text, '--drop')),
];

function readMerge(text: string): LevelWish {
  const { side, rest } = sideOf(text);
  const [into, ...others] = pieces(rest, '=');
  if (others.length === 0) {
    throw usageProblem({
      code: 'bad-merge',
      message: `${shownValue(text)} does not say which levels are merged into which`,
      place: '--merge',
      hint: 'write --merge new=a+b; a label that holds = or + goes in double quotes: --merge \'new="a+b"+c\'',
    });
  }
  const names = pieces(others.join('='), '+').map(unquoted);
  return {
    option: '--merge',
    text,
    side,
    into: checked([unquoted(into!)], text, '--merge')[0]!,
    labels: checked(names, text, '--merge'),
  };
}

function readList(text: string, option: '--keep' | '--drop'): LevelWish {
  const { side, rest } = sideOf(text);
  const labels = pieces(rest, ',').map(unquoted);
  return { option, text, side, into: undefined, labels: checked(labels, text, option) };
}

function sideOf(text: string): { side: LevelSide | undefined; rest: string } {
  const match = /^(rows|columns):/.exec(text);
  return match === null
    ? { side: undefined, rest: text }
    : { side: match[1] as LevelSide, rest: text.slice(match[0].length) };
}

/** Cut at the mark, not inside double quotes. */
function pieces(text: string, mark: string): string[] {
  const found = [''];
  let isQuoted = false;
  for (const character of text) {
    if (character === '"') isQuoted = !isQuoted;
    if (character === mark && !isQuoted) found.push('');
    else found[found.length - 1] += character;
  }
  return found;
}

function unquoted(piece: string): string {
  const text = piece.trim();
  return /^".*"$/s.test(text) && text.length > 1 ? text.slice(1, -1).replaceAll('""', '"') : text;
}

function checked(labels: readonly string[], text: string, option: string): readonly string[] {
  const problem = (code: string, message: string): Problem =>
    usageProblem({
      code,
      message,
      place: option,
      hint: `name each level once: ${option === '--merge' ? 'new=a+b' : 'a,b'}`,
    });
  if (labels.includes('')) throw problem('empty-label', `a label in ${shownValue(text)} is empty`);
  const twice = labels.find((label, index) => labels.indexOf(label) < index);
  if (twice !== undefined) throw problem('duplicate-label', `the label ${shownValue(twice)} is named twice`);
  return labels;
}
