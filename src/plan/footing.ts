// What every plan ends with: where chance comes from, how much work is allowed, and the levels.
import { blockSize } from '../null/sampled/limits.js';
import { usageProblem } from '../problem/problem.js';
import { generatorName } from '../random/stream.js';
import { share } from './settings.js';
import { freshSeed } from './fresh-seed.js';
import type { Plan, PlanOptions } from './plan.js';

/** @throws Problem (usage) `empty-seed`. */
export function refuseEmptySeed({ seed }: Pick<PlanOptions, 'seed'>): void {
  if (seed !== '') return;
  throw usageProblem({
    code: 'empty-seed',
    message: 'the seed is empty',
    place: '--seed',
    hint: 'give any text, such as --seed 2026-ward-3, or leave the option out and one is made and printed',
  });
}

type Chance = Pick<Plan, 'seed' | 'tableKey' | 'generator' | 'blockSize'>;
type Levels = Pick<Plan, 'effort' | 'alpha' | 'confidence' | 'samplingConfidence'>;

/** @param draws whether anything is drawn; a chain draws without blocks. */
export const chanceOf = (options: PlanOptions, draws: boolean, inBlocks = draws): Chance => ({
  seed: draws ? (options.seed ?? freshSeed()) : null,
  tableKey: options.tableKey ?? '',
  generator: draws ? generatorName : null,
  blockSize: inBlocks ? blockSize : null,
});

/** @throws Problem (usage) for a level outside (0, 1). */
export const levelsOf = (options: PlanOptions, effort: number): Levels => ({
  effort,
  alpha: share(options.alpha, 0.05, '--alpha'),
  confidence: share(options.confidence, 0.95, '--confidence'),
  samplingConfidence: share(options.samplingConfidence, 0.99, '--sampling-confidence'),
});
