// Power-divergence, freeman-tukey and max-residual against values and exact p-values worked out at 50 digits by another
// program (fixtures/reference/generator/power-divergence.py), through the whole analysis.
import { describe, expect, it } from 'vitest';
import cases from '../../fixtures/reference/data/power-divergence.json' with { type: 'json' };
import { analyse } from '../../src/analyse.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { checked } from '../helpers/checked-result.js';
import { relativeDifference } from '../helpers/tables.js';

interface Answer {
  value: number;
  p: number;
  strict: number;
}

describe.each(cases)('$id', ({ table, powerDivergence, maxResidual }) => {
  const hold = async (options: PlanOptions, truth: Answer): Promise<void> => {
    const { statistic, pValues } = checked(await analyse({ counts: table }, { method: 'exact', ...options }));
    for (const [what, ours, theirs] of [
      ['value', statistic.value, truth.value],
      ['p', pValues[0]!.p, truth.p],
      ['strict', pValues[0]!.strict, truth.strict],
    ] as const) {
      expect(relativeDifference(ours as number, theirs), `${what}: ${ours} not ${theirs}`).toBeLessThan(1e-12);
    }
  };

  it.each(Object.entries(powerDivergence))('power-divergence at lambda %s', async (lambda, truth) => {
    await hold({ statistic: 'power-divergence', lambda }, truth);
  });

  it('freeman-tukey', async () => hold({ statistic: 'freeman-tukey' }, powerDivergence['-1/2']));

  it('max-residual', async () => hold({ statistic: 'max-residual' }, maxResidual));
});
