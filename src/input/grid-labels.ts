// Row and column labels of a grid: where they come from, and what is refused about them.
import type { Problem } from '../problem/problem.js';
import { dataProblem, usageProblem } from '../problem/problem.js';
import { defaultLabels } from '../table/table.js';
import { parseLabelList } from './label-list.js';
import type { Side } from './level-order.js';
import { shownValue } from './shown-value.js';

/** The labels of a side: the data's own, else those given by option, else `row 1`, `row 2`, ... */
export function labelsOf(
  side: Side,
  own: readonly (string | undefined)[] | null,
  given: string | undefined,
  length: number,
): readonly string[] {
  const defaults = defaultLabels(side, length);
  if (given === undefined)
    return own === null ? defaults : own.map((label, index) => label?.trim() ?? defaults[index]!);
  const option = `--${side}-labels`;
  if (own !== null) {
    throw usageProblem({
      code: 'conflicting-labels',
      message: `the ${side}s have labels already`,
      place: option,
      hint: `leave ${option} out, or take the labels out of the data`,
    });
  }
  const labels = parseLabelList(given, option);
  if (labels.length === length) return labels;
  throw usageProblem({
    code: 'label-count',
    message: `${labels.length} label${labels.length === 1 ? '' : 's'} for ${length} ${side}${length === 1 ? '' : 's'}`,
    place: option,
    hint: `give one label for each ${side}; a label that holds a comma goes in double quotes`,
  });
}

/** Labels of lines that stay: none empty, no two equal on a side. */
export function checkLabels(
  side: Side,
  labels: readonly string[],
  leftOut: readonly number[],
  place: (index: number) => string,
): void {
  const seen = new Map<string, number>();
  labels.forEach((label, index) => {
    if (leftOut.includes(index)) return;
    if (label === '') throw emptyLabel(side, place(index));
    const earlier = seen.get(label);
    if (earlier !== undefined) {
      throw dataProblem({
        code: 'duplicate-label',
        message: `two ${side}s have the label ${shownValue(label)}, ${side} ${earlier + 1} and ${side} ${index + 1}`,
        place: place(index),
        hint: `make the ${side} labels different, or add the two ${side}s together first`,
      });
    }
    seen.set(label, index);
  });
}

const emptyLabel = (side: Side, place: string): Problem =>
  dataProblem({
    code: 'empty-label',
    message: `this ${side} has no label, while others have`,
    place,
    hint: `give the ${side} a name; if it holds totals, name it total and add --drop-totals`,
  });
