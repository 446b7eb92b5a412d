// One cell that is drawn from its law given the cells before: carries out what the plan chose for it.
import type { UniformSource } from '../../random/stream.js';
import type { CellPlan } from './cell-plan.js';
import { Guide } from './hypergeometric/guide.js';
import { invert } from './hypergeometric/inversion.js';
import type { HypergeometricMass } from './hypergeometric/mass.js';
import { reject } from './hypergeometric/rejection.js';
import { Trial } from './hypergeometric/trial.js';

export class CellSampler {
  private readonly guide: Guide | null;
  private readonly trial: Trial | null;
  private readonly goesByDrawn: boolean;
  private readonly rejects: boolean;

  constructor(
    plan: CellPlan,
    private readonly mass: HypergeometricMass,
  ) {
    const looksUp = plan.sampler === 'guide' || plan.sampler === 'trial';
    this.guide = looksUp ? new Guide(plan.laws) : null;
    this.trial = plan.sampler === 'trial' ? new Trial(plan.grid) : null;
    this.goesByDrawn = looksUp && plan.key === 'drawn';
    this.rejects = plan.sampler === 'rejection';
  }

  /** The count, when of `left` units in this and later rows and columns `marked` are in its column and `drawn` in its row. */
  draw(source: UniformSource, left: number, marked: number, drawn: number): number {
    const { guide, trial } = this;
    if (guide !== null) {
      const key = this.goesByDrawn ? drawn : marked;
      const other = this.goesByDrawn ? marked : drawn;
      for (;;) {
        // For a trial, half a word proposes and half a word decides.
        const word = source.word();
        const count = guide.select(source, key, word, trial !== null);
        if (count < 0) break;
        if (trial === null || trial.keeps(source, left - key, other - count, word & 0xffff)) return count;
      }
    } else if (this.rejects) {
      return reject(source, this.mass, left, marked, drawn);
    }
    return invert(source, source.word(), this.mass, left, marked, drawn);
  }
}
