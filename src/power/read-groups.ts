// The planned groups as typed: "[label=]p" with the probability of the event, or "[label=]p,p,..." with one for each outcome.
import { usageProblem, type Problem } from '../problem/problem.js';

export interface PlannedGroup {
  readonly label: string;
  readonly probabilities: readonly number[];
}

/** Sums may miss 1 by the rounding of a few decimals. */
const slack = 1e-6;

/**
 * @param whole true where all probabilities of all groups together make 1 (only the total is fixed).
 * @throws Problem (usage): `no-groups`, `not-a-probability`, `probabilities-sum`, `ragged-groups`.
 */
export function readGroups(operands: readonly string[], whole: boolean): PlannedGroup[] {
  if (operands.length < 2) {
    throw problem(
      'no-groups',
      'a plan needs two groups or more',
      undefined,
      'write keepsum power 0.7 0.4 --sizes 40,40',
    );
  }
  const groups = operands.map((operand, place) => oneGroup(operand, place));
  const width = groups[0]!.probabilities.length;
  const ragged = groups.find(({ probabilities }) => probabilities.length !== width);
  if (ragged !== undefined) {
    throw problem(
      'ragged-groups',
      `${ragged.probabilities.length} probabilities where the first group has ${width}`,
      ragged.label,
      'give each group the same outcomes in the same order',
    );
  }
  checkSums(groups, whole);
  return groups;
}

function oneGroup(operand: string, place: number): PlannedGroup {
  const cut = operand.lastIndexOf('=');
  const label = cut > 0 ? operand.slice(0, cut) : `group ${place + 1}`;
  const probabilities = operand
    .slice(cut + 1)
    .split(',')
    .map((text) => {
      const value = /^\s*(\d+\.?\d*|\.\d+)(e-?\d{1,3})?\s*$/i.test(text) ? Number(text) : NaN;
      if (value >= 0 && value <= 1) return value;
      throw problem(
        'not-a-probability',
        `"${text}" is not a number from 0 to 1`,
        operand,
        'for example treated=0.7 or a=0.2,0.3,0.5',
      );
    });
  return { label, probabilities };
}

function checkSums(groups: readonly PlannedGroup[], whole: boolean): void {
  const sums = groups.map(({ probabilities }) => probabilities.reduce((a, b) => a + b, 0));
  if (whole) {
    const sum = sums.reduce((a, b) => a + b, 0);
    if (Math.abs(sum - 1) > slack) {
      throw problem(
        'probabilities-sum',
        `with --total the probabilities of all cells make ${sum.toPrecision(6)}, not 1`,
        undefined,
        'with --sizes each group makes 1 on its own',
      );
    }
    return;
  }
  groups.forEach(({ label, probabilities }, k) => {
    if (probabilities.length > 1 && Math.abs(sums[k]! - 1) > slack) {
      throw problem(
        'probabilities-sum',
        `the probabilities make ${sums[k]!.toPrecision(6)}, not 1`,
        label,
        'give one for each outcome, or only that of the event',
      );
    }
  });
}

const problem = (code: string, message: string, place: string | undefined, hint: string): Problem =>
  usageProblem({ code, message, ...(place === undefined ? {} : { place }), hint });
