// What every way of putting strata together answers, so that one spine serves them all.
import type { Effect } from '../effect/contract.js';
import type { ExactCut, OrderingName } from '../null/contract.js';
import type { StrataWork } from '../plan/strata-plan.js';
import type { PValueEntry, Question } from '../pvalue/contract.js';
import type { ExpectationCheck } from '../table/expectation-check.js';
import type { LayerSampler } from './general/sample-layers.js';
import type { Layer } from './general/problem.js';

export interface StrataFamily {
  readonly work: StrataWork;
  readonly value: number;
  readonly degreesOfFreedom: number | undefined;
  /** The strata that chance has something to decide in. */
  readonly layers: readonly Layer[];
  exact(names: readonly OrderingName[]): ExactCut[];
  sampler(names: readonly OrderingName[]): LayerSampler;
  /** The usual form first; none where nothing varies. */
  approximations(question: Question): PValueEntry[];
  /** Whether the strata agree; none for tables larger than 2x2. */
  homogeneity(): Promise<PValueEntry[]>;
  effects(confidence: number, withExact: boolean): Promise<Effect[]>;
  readonly expectations: ExpectationCheck;
}
