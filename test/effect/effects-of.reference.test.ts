// Effects against answers that another program worked out (fixtures/reference/README.md), and against printed intervals.
import { describe, expect, it } from 'vitest';
import cases from '../../fixtures/reference/data/effects.json' with { type: 'json' };
import { analyse } from '../../src/analyse.js';
import { asNumber } from '../../src/effect/contract.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import type { Result } from '../../src/result/result.js';
import { checked } from '../helpers/checked-result.js';
import { relativeDifference } from '../helpers/tables.js';

type Stored = number | string | null;
interface Compared {
  riskDifference: Stored;
  newcombeCI95: Stored[] | null;
  relativeRisk: Stored;
  relativeRiskLogCI95: Stored[] | null;
}
interface Case {
  id: string;
  table: number[][];
  exact?: { blaker: number; conditionalOddsRatio: Stored; conditionalOddsRatioCI95: Stored[] | null };
  effects: {
    cramersV?: number | null;
    sampleOddsRatio?: Stored;
    woolfCI95?: Stored[] | null;
    rowsAsGroups?: Compared | null;
    columnsAsGroups?: Compared | null;
  };
}

const run = async (counts: number[][], options: PlanOptions = {}): Promise<Result> =>
  checked(await analyse({ counts }, options));

function expectNear(found: number | string | null | undefined, wanted: Stored | undefined): void {
  if (wanted === null || wanted === undefined) expect(found).toBeNull();
  else {
    const ours = asNumber(found as number);
    const theirs = Number(wanted);
    expect(ours === theirs ? 0 : relativeDifference(ours, theirs)).toBeLessThan(1e-10);
  }
}

function measure(result: Result, name: string, method?: string): (number | string | null)[] {
  const effect = result.effects!.find((one) => one.name === name)!;
  if (method === undefined) return [effect.estimate];
  const interval = effect.intervals.find((one) => one.method === method)!;
  return [interval.lower, interval.upper];
}

function expectLimits(result: Result, name: string, method: string, wanted: Stored[] | null | undefined): void {
  measure(result, name, method).forEach((limit, k) => expectNear(limit, wanted?.[k]));
}

for (const { id, table, exact, effects } of cases as Case[]) {
  if (exact === undefined) {
    it(`${id}: Cramer's V`, async () => {
      const result = await run(table, { method: 'asymptotic' });
      expectNear(measure(result, 'cramer-v')[0], effects.cramersV);
    });
    continue;
  }
  it(`${id}: odds ratios, difference and ratio with their limits, p by the smaller tail`, async () => {
    for (const groups of ['rows', 'columns'] as const) {
      const result = await run(table, { statistic: 'score', twoSidedRule: 'blaker', groups, method: 'exact' });
      const truth = effects[`${groups}AsGroups`];
      expectNear(result.pValues[0]!.p, exact.blaker);
      expectNear(measure(result, 'conditional-odds-ratio')[0], exact.conditionalOddsRatio);
      if (exact.conditionalOddsRatioCI95 !== null) {
        expectLimits(result, 'conditional-odds-ratio', 'central', exact.conditionalOddsRatioCI95);
      }
      if (truth === null || truth === undefined || truth.riskDifference === null) continue;
      expectNear(measure(result, 'odds-ratio')[0], effects.sampleOddsRatio);
      expectLimits(result, 'odds-ratio', 'woolf', effects.woolfCI95);
      expectNear(measure(result, 'risk-difference')[0], truth.riskDifference);
      expectLimits(result, 'risk-difference', 'newcombe', truth.newcombeCI95);
      expectNear(measure(result, 'risk-ratio')[0], truth.relativeRisk);
      expectLimits(result, 'risk-ratio', 'log', truth.relativeRiskLogCI95);
    }
  });
}

describe('printed intervals', () => {
  it.each([
    [
      '56/70 - 48/80',
      [
        [56, 14],
        [48, 32],
      ],
      0.0524,
      0.3339,
    ],
    [
      '9/10 - 3/10',
      [
        [9, 1],
        [3, 7],
      ],
      0.1705,
      0.809,
    ],
    [
      '0/10 - 0/20',
      [
        [0, 10],
        [0, 20],
      ],
      -0.1611,
      0.2775,
    ],
  ] as const)('Newcombe (1998), method 10: %s', async (_, table, lower, upper) => {
    const result = await run(table.map((row) => [...row]));
    const [low, high] = measure(result, 'risk-difference', 'newcombe').map((limit) => asNumber(limit as number));
    expect(Math.abs(low! - lower)).toBeLessThan(5.1e-5);
    expect(Math.abs(high! - upper)).toBeLessThan(5.1e-5);
  });

  it("Fisher's (1935) twins: conditional odds ratio and exact limits (worked out in exact arithmetic)", async () => {
    const result = await run([[2, 15], [10, 3]]); // prettier-ignore
    expect(Math.abs(asNumber(measure(result, 'conditional-odds-ratio')[0] as number) - 0.0469366)).toBeLessThan(5e-8);
    expectLimits(result, 'conditional-odds-ratio', 'central', [0.003317163950657364, 0.3631896023566805]);
  });
});
