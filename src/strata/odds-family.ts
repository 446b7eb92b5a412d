// Strata of two groups and two outcomes: one odds ratio for all of them.
import { extended, type Effect } from '../effect/contract.js';
import type { OrderingName } from '../null/contract.js';
import type { Rational } from '../numeric/rational.js';
import type { PValueEntry, Question } from '../pvalue/contract.js';
import { chiSquarePValue, normalPValue } from '../pvalue/from-asymptotic.js';
import { exactPValue } from '../pvalue/from-exact.js';
import { mantelFleiss } from './expectations.js';
import type { StrataFamily } from './family.js';
import { judgeFor } from './general/judge.js';
import { problemFor, type Layer } from './general/problem.js';
import { layerSampler } from './general/sample-layers.js';
import { conditionalEstimate, conditionalIntervals } from './odds/conditional-odds-ratio.js';
import { commonCuts } from './odds/exact-common.js';
import { breslowDay } from './odds/homogeneity.js';
import { mantelHaenszelEffects, scoreTest } from './odds/mantel-haenszel.js';
import { speaks, type Stratum } from './odds/stratum.js';
import { SumLaw } from './odds/sum-law.js';
import { convolutionWork } from './odds/work.js';

/**
 * @param strata all of them, those without a word to say too: risks use them.
 * @param layers those that speak, whose row scores mark the first group and column scores the event
 */
export function oddsFamily(strata: readonly Stratum[], layers: readonly Layer[]): StrataFamily {
  const speaking = strata.filter(speaks);
  const law = new SumLaw(speaking);
  const observed = speaking.reduce((sum, { a }) => sum + a, 0);
  const everywhere = strata.reduce((sum, { a }) => sum + a, 0);
  return {
    work: convolutionWork(speaking),
    value: everywhere,
    degreesOfFreedom: undefined,
    layers,
    expectations: mantelFleiss(layers, speaking),
    exact: (names: readonly OrderingName[]) => commonCuts(law, observed, names),
    sampler(names) {
      const problem = problemFor('score-correlation', layers, 2, 2);
      return layerSampler(problem, judgeFor(problem), names);
    },
    approximations: (question) => approximations(question, speaking),
    async homogeneity() {
      const asymptotic = breslowDayEntries(strata);
      const zelen = await zelenEntry(speaking, law, observed);
      return zelen === undefined ? asymptotic : [...asymptotic, zelen];
    },
    async effects(confidence, withExact) {
      const { jStat } = await import('jstat');
      const z = jStat.normal.inv(1 - (1 - confidence) / 2, 0, 1);
      const exact: Effect[] = withExact
        ? [
            {
              name: 'conditional-odds-ratio',
              estimate: extended(conditionalEstimate(law, observed)),
              intervals: conditionalIntervals(law, observed, confidence),
            },
          ]
        : [];
      return [...exact, ...mantelHaenszelEffects(strata, z, confidence)];
    },
  };
}

/** Scores that make T the corner count of a stratum. */
export function cornerScores(first: number, length: number): Rational[] {
  return Array.from({ length }, (_, line) => ({ numerator: line === first ? 1n : 0n, denominator: 1n }));
}

function approximations(question: Question, strata: readonly Stratum[]): PValueEntry[] {
  const { difference, variance, plain, corrected } = scoreTest(strata);
  if (!(variance > 0)) return [];
  return [form('mantel-haenszel', plain), form('mantel-haenszel-corrected', corrected)];

  function form(statistic: string, value: number): PValueEntry {
    const asked = { ...question, statistic };
    if (question.tail === 'both') return { ...chiSquarePValue(asked, value, 1), value };
    const root = Math.sign(difference) * Math.sqrt(value);
    return { ...normalPValue(asked, root), value: root };
  }
}

function breslowDayEntries(strata: readonly Stratum[]): PValueEntry[] {
  const found = breslowDay(strata);
  if (found === undefined) return [];
  return (['breslow-day', 'tarone'] as const).map((statistic) => {
    const value = Math.max(0, statistic === 'tarone' ? found.tarone : found.breslowDay);
    return { ...chiSquarePValue({ tail: 'upper', rule: null, statistic }, value, found.degreesOfFreedom), value };
  });
}

async function zelenEntry(strata: readonly Stratum[], law: SumLaw, observed: number): Promise<PValueEntry | undefined> {
  if (strata.length < 2) return undefined;
  const { zelenCut } = await import('./odds/zelen.js');
  const inside = Math.min(law.highest - 0.25, Math.max(law.lowest + 0.25, observed));
  const cut = zelenCut(strata, law.psiFor(inside));
  if (cut === null) return undefined;
  const question = { tail: 'upper' as const, rule: null, statistic: 'zelen' };
  const entry = exactPValue(question, cut, cut.tied);
  // What ties is not the one observed set of tables, so its own probability is not stated.
  delete entry.point;
  return { ...entry, orderedBy: 'probability of the tables given every margin and the sum of the corners' };
}
