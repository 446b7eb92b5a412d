// Trend against answers worked out elsewhere in exact arithmetic, and a published table (fixtures/reference/README.md).
import { describe, expect, it } from 'vitest';
import cases from '../../fixtures/reference/data/ordinal.json' with { type: 'json' };
import { analyse } from '../../src/analyse.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { checked } from '../helpers/checked-result.js';
import { relativeDifference } from '../helpers/tables.js';

interface Case {
  id: string;
  title: string;
  source: string;
  table: number[][];
  rowScores: number[];
  colScores: number[];
  exact?: Record<'S' | 'mean' | 'upper' | 'lower' | 'twoSided' | 'point' | 'midUpper' | 'midLower' | 'doubled', number>;
  asymptotic?: { M2: number; p: number; z: number };
  published?: { armitage: number; M2: number; upper: number };
}

describe.each(cases as Case[])('$id: $title ($source)', ({ table, rowScores, colScores, ...truth }) => {
  const run = async (options: PlanOptions): Promise<ReturnType<typeof checked>> =>
    checked(
      await analyse(
        { counts: table },
        { statistic: 'trend', rowScores, columnScores: colScores, effort: 1e9, ...options },
      ),
    );

  const { exact, asymptotic, published } = truth;
  if (exact !== undefined) {
    it('value, both tails, mid p and every two-tailed rule, exact', async () => {
      const result = await run({ method: 'exact' });
      const [both, upper, lower] = result.pValues;
      const doubled = (await run({ method: 'exact', twoSidedRule: 'doubled' })).pValues[0]!;
      expect(result.statistic.value).toBe(exact.S);
      for (const [what, ours, theirs] of [
        ['distance', both!.p, exact.twoSided],
        ['upper', upper!.p, exact.upper],
        ['lower', lower!.p, exact.lower],
        ['tied', upper!.tied, exact.point],
        ['mid upper', upper!.mid, exact.midUpper],
        ['mid lower', lower!.mid, exact.midLower],
        ['doubled', doubled.p, exact.doubled],
      ] as const) {
        expect(relativeDifference(ours!, theirs), `${what}: ${ours} not ${theirs}`).toBeLessThan(1e-12);
      }
    });
  }

  if (asymptotic !== undefined) {
    it('the (n - 1) r² form', async () => {
      const [headline] = (await run({ method: 'asymptotic' })).pValues;
      expect(relativeDifference(headline!.value!, asymptotic.z)).toBeLessThan(1e-12);
      expect(relativeDifference(headline!.p!, asymptotic.p)).toBeLessThan(1e-11);
    });
  }

  if (published !== undefined) {
    it('the published figures: both asymptotic forms and the exact one-tailed p', async () => {
      const { pValues } = await run({ method: 'exact', tail: 'upper' });
      const formOf = (name: string): number =>
        pValues.find((p) => p.method === 'asymptotic' && p.statistic === name)!.value!;
      expect(pValues[0]!.p!).toBeCloseTo(published.upper, 11);
      expect(formOf('trend') ** 2).toBeCloseTo(published.M2, 5);
      expect(formOf('trend-armitage') ** 2).toBeCloseTo(published.armitage, 8);
    });
  }
});
