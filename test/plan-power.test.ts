// The power of planned studies: what is answered, how, and what is refused.
import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { planPower, type PowerWishes } from '../src/plan-power.js';
import { readGroups } from '../src/power/read-groups.js';
import { powerJsonSchema, type PowerResult } from '../src/result/power-declaration.js';

const validate = new Ajv2020({ allErrors: true, strict: false }).compile(powerJsonSchema());

async function power(operands: string[], wishes: Omit<PowerWishes, 'groups'>): Promise<PowerResult> {
  const result = await planPower({ groups: readGroups(operands, wishes.totals !== undefined), ...wishes });
  if (!validate(JSON.parse(JSON.stringify(result)))) throw new Error(JSON.stringify(validate.errors));
  return result;
}

describe('exact power of two groups', () => {
  it('is given for sizes named, one number for both or one for each', async () => {
    const one = await power(['0.7', '0.4'], { sizes: [[20]] });
    const two = await power(['0.7', '0.4'], { sizes: [[20, 20]] });
    expect(one.answers).toEqual(two.answers);
    expect(one.plan.method).toBe('exact');
  });

  it('finds the smallest groups, which reach it while one unit fewer does not', async () => {
    for (const test of ['conditional', 'mid', 'unconditional'] as const) {
      const { answers, smallest } = await power(['0.9', '0.4'], { power: 0.8, test });
      const [first] = answers[smallest!.reached!]!.sizes!;
      expect(answers[smallest!.reached!]!.power).toBeGreaterThanOrEqual(0.8);
      const before = await power(['0.9', '0.4'], { sizes: [[first! - 1]], test });
      expect(before.answers[0]!.power).toBeLessThan(0.8);
    }
  });

  it('says so where no sizes looked at reach the power', async () => {
    const { smallest, notes } = await power(['0.5', '0.45'], { power: 0.8, largest: 20 });
    expect(smallest!.reached).toBeNull();
    expect(notes.map(({ code }) => code)).toContain('not-reached');
  });
});

describe('simulated power', () => {
  const three = ['a=0.2,0.3,0.5', 'b=0.5,0.3,0.2'];

  it('is the same for the same seed, and its limits hold the exact power', async () => {
    const wishes = { sizes: [[20, 20]], statistic: 'score', tables: 400, seed: 'plan' };
    const simulated = await power(['0.7', '0.3'], wishes);
    expect(await power(['0.7', '0.3'], wishes)).toEqual(simulated);
    const exact = (await power(['0.7', '0.3'], { sizes: [[20, 20]] })).answers[0]!.power;
    const [answer] = simulated.answers;
    expect(
      answer!.error.kind === 'sampling' && answer!.error.interval[0] < exact && exact < answer!.error.interval[1],
    ).toBe(true);
  });

  it('takes more outcomes, with sizes or only a total fixed', async () => {
    const rows = await power(three, { sizes: [[15, 15]], tables: 50, seed: 'a' });
    expect(rows.answers[0]!.sizes).toEqual([15, 15]);
    const total = await power(['a=0.1,0.15,0.25', 'b=0.25,0.15,0.1'], { totals: [30], tables: 50, seed: 'a' });
    expect(total.answers[0]).toMatchObject({ sizes: null, total: 30 });
  });
});

describe('refused', () => {
  it.each([
    [['0.7'], { sizes: [[20]] }, 'no-groups'],
    [['0.7', '1.4'], { sizes: [[20]] }, 'not-a-probability'],
    [['0.7,0.2', '0.4,0.6'], { sizes: [[20]] }, 'probabilities-sum'],
    [['0.2,0.3,0.5', '0.4,0.6'], { sizes: [[20]] }, 'ragged-groups'],
    [['0.7', '0.4'], {}, 'sizes-or-power'],
    [['0.7', '0.4'], { sizes: [[20]], power: 0.8 }, 'sizes-or-power'],
    [['0.7', '0.4'], { sizes: [[20, 20, 20]] }, 'size-count'],
    [['0.7', '0.4'], { sizes: [[20]], seed: 'a' }, 'option-without-effect'],
    [['0.7', '0.4', '0.1'], { power: 0.8 }, 'option-without-effect'],
    [['0.7', '0.4'], { sizes: [[20]], tail: 'upper', twoSidedRule: 'distance' }, 'option-without-effect'],
    [['0.7', '0.4'], { sizes: [[5000]] }, 'out-of-range'],
  ] as [string[], Omit<PowerWishes, 'groups'>, string][])('%j %j: %s', async (operands, wishes, code) => {
    await expect(power(operands, wishes)).rejects.toMatchObject({ code });
  });
});
