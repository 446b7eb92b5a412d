// A declared order brings the questions that use it, each with its own p, and says which is which.
import { describe, expect, it } from 'vitest';
import { analyse } from '../src/analyse.js';
import type { PlanOptions } from '../src/plan/plan.js';
import type { Result } from '../src/result/result.js';
import { checked } from './helpers/checked-result.js';

const doses = { counts: [[2, 18, 30], [5, 20, 25], [6, 24, 20], [12, 22, 16]] }; // prettier-ignore
const groups = { counts: [[4, 6, 3], [2, 7, 5], [1, 3, 9]] }; // prettier-ignore

const run = async (data: { counts: number[][] }, options: PlanOptions): Promise<Result> =>
  checked(await analyse(data, { draws: 2000, seed: 'a', ...options }));
const asked = ({ order }: Result): string[] => (order?.questions ?? []).map(({ asks }) => asks);

describe('a declared order', () => {
  it('of both sides adds the trend by scores and the trend of any shape, and the ordinal measures', async () => {
    const result = await run(doses, { ordered: 'both' });
    expect(asked(result)).toEqual(['rise-together', 'rise-of-any-shape']);
    expect(result.effects!.map(({ name }) => name)).toEqual(
      expect.arrayContaining(['gamma', 'tau-b', 'tau-c', 'somers-d-columns', 'somers-d-rows']),
    );
    expect(result.order!.direction!.correlation).toBeLessThan(0);
  });

  it('of one side compares the groups on its scale', async () => {
    const result = await run(groups, { ordered: 'columns' });
    expect(asked(result)).toEqual(['groups-on-a-scale']);
    expect(result.order!.questions[0]!.groups).toBe('rows');
    expect((await run(groups, { ordered: 'rows' })).order!.questions[0]!.groups).toBe('columns');
  });

  it('of one side is one of both where the other has two levels', async () => {
    const result = await run({ counts: doses.counts.map(([a, b]) => [a!, b!]) }, { ordered: 'rows' });
    expect(result.order!.ordered).toBe('both');
  });

  it('gives the very p that each question has when it is the headline', async () => {
    const { order } = await run(doses, { ordered: 'both', rowScores: [0, 1, 2, 4] });
    for (const { statistic, groups: side, p, seed } of order!.questions) {
      const alone = await run(doses, {
        statistic: statistic.name,
        ...(side === undefined ? {} : { groups: side }),
        ...(statistic.name === 'trend' ? { rowScores: [0, 1, 2, 4] } : {}),
        ...(seed === undefined ? {} : { seed }),
      });
      expect(alone.pValues[0]).toMatchObject(p);
    }
  });

  it('leaves the headline as it is', async () => {
    expect((await run(doses, { ordered: 'both' })).pValues).toEqual((await run(doses, {})).pValues);
  });

  it('is echoed by the plan with the scores that its questions read', async () => {
    const { plan } = await run(doses, { ordered: 'both', columnScores: '0,1,3' });
    expect(plan.ordered).toBe('both');
    expect(plan.columnScores).toEqual([0, 1, 3]);
  });
});

describe('without one', () => {
  it('a trend brings the measures and the direction, but no further test', async () => {
    const result = await run(doses, { statistic: 'trend' });
    expect(asked(result)).toEqual([]);
    expect(result.order!.direction).toMatchObject({ fromRow: 'row 1', toRow: 'row 4', towardsColumn: 'column 1' });
  });

  it('pearson brings nothing of the kind', async () => {
    expect((await run(doses, {})).order).toBeUndefined();
  });
});

describe('refused', () => {
  it('an unknown side', async () => {
    await expect(analyse(doses, { ordered: 'all' as 'both' })).rejects.toMatchObject({ code: 'unknown-value' });
  });

  it('scores of the side of the groups', async () => {
    await expect(analyse(groups, { statistic: 'kruskal-wallis', rowScores: [1, 2, 3] })).rejects.toMatchObject({
      code: 'option-without-effect',
    });
  });
});
