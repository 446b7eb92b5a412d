// Unconditional exact p-values against another program's (exact rational sets, 20,001 points and polishing;
// fixtures/reference/README.md), and against the maximum worked out to 30 digits by other means
// (mpmath, exact set, golden-section search) for 7 of 34 and 1 of 34, and quoted figures of both ways round.
import { describe, expect, it } from 'vitest';
import cases from '../../../fixtures/reference/data/unconditional.json' with { type: 'json' };
import { groupsSeen } from '../../../src/null/unconditional/outcomes.js';
import { unconditionalP, type UnconditionalOrder } from '../../../src/null/unconditional/unconditional-p.js';
import { relativeDifference } from '../../helpers/tables.js';

const sides = ['rows', 'columns'] as const;
const seenIn = (cells: number[][], groups: 'rows' | 'columns'): ReturnType<typeof groupsSeen> =>
  groupsSeen({ cells, groups, event: 0, first: 0 });

describe.each(cases)('$id: $title ($source)', (reference) => {
  it.each(sides)('every order and tail, groups are the %s', (side) => {
    for (const [by, answers] of Object.entries(reference[side])) {
      for (const [tail, truth] of Object.entries(answers)) {
        const { p, relativeError } = unconditionalP(seenIn(reference.table, side), { by, tail } as UnconditionalOrder);
        expect(relativeDifference(p, truth), `${by} ${tail}: ${p} not ${truth}`).toBeLessThan(1e-10);
        expect(relativeError).toBeLessThan(1e-10);
      }
    }
  });
});

it.each([
  ['rows', 0.028105841116298856, 1e-12],
  ['rows', 0.0281058412, 1e-10],
  ['columns', 0.0504887, 5e-8],
] as const)('7,27 1,33 ordered by the score, groups are the %s', (side, truth, rounding) => {
  const { p } = unconditionalP(
    seenIn(
      [
        [7, 27],
        [1, 33],
      ],
      side,
    ),
    { by: 'score', tail: 'distance' },
  );
  expect(Math.abs(p - truth)).toBeLessThan(rounding);
});
