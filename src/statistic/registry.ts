// Every statistic there is. Help, checks, reports and tests read this list; adding one is one file and one line here.
import { nameHint } from '../problem/suggest.js';
import { usageProblem } from '../problem/problem.js';
import type { Statistic } from './contract.js';
import { freemanTukey } from './freeman-tukey.js';
import { isotonicTrend } from './isotonic-trend.js';
import { kruskalWallis } from './kruskal-wallis.js';
import { likelihoodRatio } from './likelihood-ratio.js';
import { maxResidual } from './max-residual.js';
import { pearson } from './pearson.js';
import { powerDivergence } from './power-divergence.js';
import { probability } from './probability.js';
import { score } from './score.js';
import { trend } from './trend.js';
import { wald } from './wald.js';

export const statistics: readonly Statistic[] = [
  pearson,
  likelihoodRatio,
  probability,
  powerDivergence,
  freemanTukey,
  maxResidual,
  wald,
  score,
  trend,
  isotonicTrend,
  kruskalWallis,
];

export const statisticNames: readonly string[] = statistics.map((statistic) => statistic.name);

/** @throws Problem (usage) `unknown-statistic`, with a suggestion. */
export function statisticNamed(name: string): Statistic {
  const found = statistics.find((statistic) => statistic.name === name);
  if (found !== undefined) return found;
  throw usageProblem({
    code: 'unknown-statistic',
    message: `there is no statistic named "${name}"`,
    place: '--statistic',
    hint: nameHint(name, statisticNames),
  });
}
