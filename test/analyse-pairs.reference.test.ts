// Published tables of pairs with answers that another program worked out in exact arithmetic; see fixtures/reference/README.md.
import { describe, expect, it } from 'vitest';
import cases from '../fixtures/reference/data/paired.json' with { type: 'json' };
import { analyse } from '../src/analyse.js';
import type { PValue } from '../src/result/result.js';
import { checked } from './helpers/checked-result.js';
import { relativeDifference } from './helpers/tables.js';

interface Case {
  readonly id: string;
  readonly table: number[][];
  readonly answers: {
    readonly exact: {
      readonly mcnemar?: { readonly p: number; readonly lower: number; readonly upper: number; readonly midP: number };
      readonly bowker: { readonly p: number; readonly strict: number } | null;
    };
    readonly asymptotic: {
      readonly mcnemar?: { readonly statistic: number; readonly p: number } | null;
      readonly mcnemarCorrected?: { readonly statistic: number; readonly p: number } | null;
      readonly bowker: {
        readonly statistic: number;
        readonly dfNonEmptyPairs: number;
        readonly pNonEmptyPairs: number;
      };
    };
    readonly effects: {
      readonly oddsRatio?: number | string | null;
      readonly oddsRatioExactCI95?: readonly (number | string)[] | null;
      readonly kappa: number;
    };
  };
}

const near = (ours: number, theirs: number, bound = 1e-12): void =>
  expect(relativeDifference(ours, theirs)).toBeLessThan(bound);
const word = (x: number | string): number | string => (x === 'Infinity' ? 'infinity' : x);

for (const { id, table, answers } of cases as unknown as Case[]) {
  describe(id, () => {
    const { exact, asymptotic, effects } = answers;
    const find = (entries: readonly PValue[], statistic: string, method: string): PValue | undefined =>
      entries.find((p) => p.statistic === statistic && p.method === method);

    it.runIf(exact.mcnemar)('McNemar, exact and asymptotic, and the matched odds ratio', async () => {
      const result = checked(await analyse({ counts: table }, { paired: true }));
      const [both, upper, lower] = result.pValues;
      near(both!.p!, exact.mcnemar!.p);
      near(upper!.p!, exact.mcnemar!.upper);
      near(lower!.p!, exact.mcnemar!.lower);
      const doubled = await analyse({ counts: table }, { paired: true, twoSidedRule: 'doubled' });
      near(doubled.pValues[0]!.mid!, exact.mcnemar!.midP);
      if (asymptotic.mcnemar) {
        near((result.statistic.value as number) ** 2, asymptotic.mcnemar.statistic);
        near(find(result.pValues, 'mcnemar', 'asymptotic')!.p!, asymptotic.mcnemar.p);
        near(find(result.pValues, 'mcnemar-corrected', 'asymptotic')!.p!, asymptotic.mcnemarCorrected!.p);
      }
      const [odds] = result.effects!;
      expect(odds!.estimate).toBe(effects.oddsRatio === null ? null : word(effects.oddsRatio!));
      effects.oddsRatioExactCI95?.forEach((limit, k) => {
        const ours = k === 0 ? odds!.intervals[0]!.lower : odds!.intervals[0]!.upper;
        if (typeof limit === 'string') expect(ours).toBe(word(limit));
        else near(ours as number, limit, 1e-10);
      });
    });

    it('symmetry, and kappa', async () => {
      const result = checked(await analyse({ counts: table }, { paired: true, statistic: 'bowker' }));
      expect(result.plan.method).toBe('exact');
      if (exact.bowker !== null) {
        near(result.pValues[0]!.p!, exact.bowker.p);
        near(result.pValues[0]!.strict!, exact.bowker.strict);
      }
      near(result.statistic.value as number, asymptotic.bowker.statistic);
      expect(result.statistic.degreesOfFreedom).toBe(asymptotic.bowker.dfNonEmptyPairs);
      const limit = find(result.pValues, 'bowker', 'asymptotic');
      if (limit !== undefined) near(limit.p!, asymptotic.bowker.pNonEmptyPairs);
      const options = { paired: true, statistic: 'kappa', method: 'asymptotic' } as const;
      const agreement = checked(await analyse({ counts: table }, options));
      near(agreement.statistic.value as number, effects.kappa);
      expect(agreement.effects![0]!.estimate).toBe(agreement.statistic.value);
    });
  });
}

describe('published figures', () => {
  it('approval 794 150 / 86 570 (Agresti 1990): exact 3.71593614e-5', async () => {
    const { pValues } = await analyse(
      {
        counts: [
          [794, 150],
          [86, 570],
        ],
      },
      { paired: true },
    );
    expect(pValues[0]!.p!.toExponential(8)).toBe('3.71593614e-5');
  });

  it("Stuart's statistic of unaided vision is 11.96 on 3 degrees of freedom (Stuart 1955; from memory)", async () => {
    const { table } = (cases as unknown as Case[]).find(({ id }) => id === 'p05-vision')!;
    const options = { paired: true, statistic: 'marginal-homogeneity', method: 'asymptotic' } as const;
    const { statistic } = await analyse({ counts: table }, options);
    expect((statistic.value as number).toFixed(2)).toBe('11.96');
    expect(statistic.degreesOfFreedom).toBe(3);
  });

  it('1 1 / 7 12: exact 0.070, mid 0.039, unconditional 0.0353 (Fagerland, Lydersen & Laake 2013; from memory)', async () => {
    const { pValues } = await analyse(
      {
        counts: [
          [1, 1],
          [7, 12],
        ],
      },
      { paired: true },
    );
    expect(pValues[0]!.p!.toFixed(3)).toBe('0.070');
    expect(pValues[0]!.mid!.toFixed(3)).toBe('0.039');
    expect(pValues.find(({ method }) => method === 'unconditional')!.p!.toFixed(4)).toBe('0.0353');
  });
});
