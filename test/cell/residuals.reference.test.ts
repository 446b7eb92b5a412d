// Expected counts and adjusted residuals (Haberman 1973) of published and constructed tables, worked out by another program
// (fixtures/reference/README.md).
import { describe, expect, it } from 'vitest';
import cases from '../../fixtures/reference/data/residuals.json' with { type: 'json' };
import { analyse } from '../../src/analyse.js';
import { checked } from '../helpers/checked-result.js';

interface Case {
  id: string;
  title: string;
  table: number[][];
  expected: number[][];
  adjustedResiduals: (number | null)[][];
}

describe('expected counts and adjusted residuals', () => {
  it.each(cases as Case[])('$id: $title', async ({ table, expected, adjustedResiduals }) => {
    const { cells } = checked(await analyse({ counts: table }, { method: 'asymptotic' }));
    expect(cells).toHaveLength(table.flat().length);
    cells!.forEach((cell, k) => {
      const [e, residual] = [expected.flat()[k]!, adjustedResiduals.flat()[k]!];
      expect(Math.abs(cell.expected - e)).toBeLessThanOrEqual(1e-14 * e);
      if (residual === null) expect(cell.adjustedResidual).toBeNull();
      else
        expect(Math.abs(cell.adjustedResidual! - residual)).toBeLessThanOrEqual(
          1e-12 * Math.max(1, Math.abs(residual)),
        );
    });
  });
});
