// gamma, tau-b and Somers' d against values worked out elsewhere from counts of pairs (fixtures/reference/README.md).
import { describe, expect, it } from 'vitest';
import cases from '../../fixtures/reference/data/ordinal-measures.json' with { type: 'json' };
import { ordinalMeasures } from '../../src/order/measures.js';
import { makeTable } from '../../src/table/table.js';

describe('the ordinal measures equal the carried answers', () => {
  it.each(cases)('$id: $title ($source)', ({ table, gamma, tauB, somersColumns, somersRows }) => {
    const ours = ordinalMeasures(makeTable({ counts: table }));
    const estimate = (name: string): number => ours.find((measure) => measure.name === name)!.estimate!;
    expect(estimate('gamma')).toBeCloseTo(gamma, 13);
    expect(estimate('tau-b')).toBeCloseTo(tauB, 13);
    expect(estimate('somers-d-columns')).toBeCloseTo(somersColumns, 13);
    expect(estimate('somers-d-rows')).toBeCloseTo(somersRows, 13);
  });
});
