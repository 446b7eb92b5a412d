// The spine of a planned study: groups and wishes in, the power of the test out, exact for two groups with one event, by
// simulation for larger plans.
import { answer } from './analyse.js';
import { freshSeed } from './plan/fresh-seed.js';
import type { PlanOptions } from './plan/plan.js';
import { exactPower } from './power/exact-power.js';
import { settlePower, type PowerWishes, type SettledPower } from './power/settle.js';
import { countRejections } from './power/simulate-power.js';
import { smallestSizes } from './power/smallest-sizes.js';
import { clopperPearson } from './pvalue/clopper-pearson.js';
import { powerMethods, powerSentence } from './result/power-words.js';
import type { PowerAnswer, PowerResult } from './result/power-declaration.js';
import { version } from './result/version.js';

export type { PowerWishes } from './power/settle.js';

/** Limits of a simulated power. */
const confidence = 0.99;

/**
 * The power of a test for a planned study.
 * @param onProgress told how far a search or simulation is: done, and the most there will be.
 * @throws Problem (usage) for plans that make no sense together.
 */
export async function planPower(
  wishes: PowerWishes,
  onProgress?: (done: number, most: number) => void,
): Promise<PowerResult> {
  const settled = settlePower(wishes);
  const parts =
    settled.method === 'exact' ? exactParts(settled, onProgress) : await simulatedParts(settled, onProgress);
  const before = {
    schema: 'keepsum/power/1' as const,
    tool: { name: 'keepsum' as const, version },
    ...parts,
    notes: [],
  };
  return { ...before, sentence: powerSentence(before), methods: powerMethods(before), notes: notesOf(before) };
}

type Parts = Pick<PowerResult, 'plan' | 'answers' | 'smallest'>;

function exactParts(settled: SettledPower, onProgress?: (done: number, most: number) => void): Parts {
  const { groups, testing, alpha, wanted, ratio, largest } = settled;
  const proportions = groups.map(({ probabilities }) => probabilities[0]!) as [number, number];
  const plan: PowerResult['plan'] = {
    groups: groupsEcho(settled),
    fixed: 'rows',
    method: 'exact',
    test: testing.test,
    ...(testing.test === 'unconditional' ? { order: testing.order } : {}),
    tail: testing.tail,
    twoSidedRule: testing.rule,
    seed: null,
    alpha,
    ...(wanted === undefined ? {} : { wanted, ratio }),
  };
  if (wanted === undefined) {
    const answers = settled.sizes.map((sizes, k) => {
      onProgress?.(k, settled.sizes.length);
      const [first, second] = sizes as [number, number];
      return exactAnswer({ first, second, ...exactPower({ first, second }, proportions, testing) });
    });
    return { plan, answers };
  }
  const found = smallestSizes({
    proportions,
    power: wanted,
    ratio,
    largest,
    testing,
    ...(onProgress === undefined ? {} : { onProgress: (first: number) => onProgress(first, largest) }),
  });
  const { reached, steady } = found;
  const differ = steady !== undefined && steady.first !== reached?.first;
  return {
    plan,
    answers: [...(reached === undefined ? [] : [exactAnswer(reached)]), ...(differ ? [exactAnswer(steady)] : [])],
    smallest: {
      reached: reached === undefined ? null : 0,
      steady: steady === undefined ? null : differ ? 1 : 0,
      lookedAtFrom: found.startedAt,
      lookedAtTo: found.lookedAtTo,
    },
  };
}

const groupsEcho = ({ groups }: SettledPower): PowerResult['plan']['groups'] =>
  groups.map(({ label, probabilities }) => ({ label, probabilities: [...probabilities] }));

const exactAnswer = (found: { first: number; second: number; power: number; size: number }): PowerAnswer => ({
  sizes: [found.first, found.second],
  total: found.first + found.second,
  power: found.power,
  size: found.size,
  error: { kind: 'rounding', absolute: 1e-11 },
});

async function simulatedParts(
  settled: SettledPower,
  onProgress?: (done: number, most: number) => void,
): Promise<Parts> {
  const { groups, alpha, tables, statistic, pMethod, draws, effort, testing } = settled;
  const seed = settled.seed ?? freshSeed();
  const columns = groups[0]!.probabilities.length === 1 ? 2 : groups[0]!.probabilities.length;
  const whole = groups.map(({ probabilities }) =>
    probabilities.length === 1 ? [probabilities[0]!, 1 - probabilities[0]!] : probabilities,
  );
  const options: PlanOptions = {
    statistic,
    method: pMethod,
    effort,
    alpha,
    ...(testing.tail === 'both' ? (testing.rule === null ? {} : { twoSidedRule: testing.rule }) : {}),
    ...(settled.tailGiven ? { tail: testing.tail } : {}),
  };
  const answers: PowerAnswer[] = [];
  for (const [place, sizes] of settled.sizes.entries()) {
    const laws =
      settled.fixed === 'rows'
        ? whole.map((probabilities, g) => ({ units: sizes[g]!, probabilities }))
        : [{ units: sizes[0]!, probabilities: whole.flat() }];
    const key = `power ${sizes.join()}`;
    const plan = { laws, rows: groups.length, columns, tables, seed, key };
    const rejected = await countRejections(
      plan,
      (counts) => rejects(counts, key),
      (done) => onProgress?.(place * tables + done, settled.sizes.length * tables),
    );
    answers.push(await simulatedAnswer(settled.fixed === 'rows' ? sizes : null, sizes, rejected, tables));
  }
  return {
    plan: {
      groups: groupsEcho(settled),
      fixed: settled.fixed,
      method: 'simulation',
      tail: testing.tail,
      twoSidedRule: testing.rule,
      statistic,
      pMethod,
      tables,
      draws,
      effort,
      seed,
      alpha,
    },
    answers,
  };

  async function rejects(counts: number[][], key: string): Promise<boolean> {
    const { pValues } = await answer(
      { counts },
      { ...options, ...(pMethod === 'asymptotic' ? {} : { draws, seed: `${seed} ${key}` }) },
      { threads: 1 },
    );
    const { p } = pValues[0]!;
    return p === null || p <= alpha;
  }
}

async function simulatedAnswer(
  sizes: readonly number[] | null,
  units: readonly number[],
  rejected: number,
  tables: number,
): Promise<PowerAnswer> {
  const power = rejected / tables;
  return {
    sizes: sizes === null ? null : [...sizes],
    total: units.reduce((a, b) => a + b, 0),
    power,
    error: {
      kind: 'sampling',
      rejected,
      tables,
      standardError: Math.sqrt((power * (1 - power)) / tables),
      interval: await clopperPearson(rejected, tables, confidence),
      confidence,
    },
  };
}

function notesOf({
  plan,
  answers,
  smallest,
}: Pick<PowerResult, 'plan' | 'answers' | 'smallest'>): PowerResult['notes'] {
  const notes: PowerResult['notes'] = [];
  if (plan.test === 'mid') {
    const worst = Math.max(0, ...answers.map(({ size }) => size ?? 0));
    notes.push({
      code: 'mid-not-guaranteed',
      text: `A mid-p test does not promise its level; here it rejects with probability up to ${worst.toPrecision(3)} when the groups are alike.`,
    });
  }
  if (smallest?.reached === null) {
    notes.push({
      code: 'not-reached',
      text: `No sizes up to ${smallest.lookedAtTo} in the first group reach the power wanted; --largest looks further.`,
    });
  }
  return notes;
}
