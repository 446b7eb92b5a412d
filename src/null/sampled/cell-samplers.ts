// The cells that are drawn one by one from their law given the cells before: carries out what the plan chose for each.
import type { UniformSource } from '../../random/stream.js';
import type { DrawPlan } from './draw-plan.js';
import { Guides, type GuidedLaws } from './hypergeometric/guide.js';
import { invert } from './hypergeometric/inversion.js';
import { HypergeometricMass } from './hypergeometric/mass.js';
import { reject } from './hypergeometric/rejection.js';
import { Trials, type TrialGrid } from './hypergeometric/trial.js';

const byMarkedGuide = 0;
const byDrawnGuide = 1;
const byMarkedTrial = 2;
const byDrawnTrial = 3;
const byRejection = 4;
const byInversion = 5;

export class CellSamplers {
  private readonly samplers: Uint8Array;
  /** For cells with a guide, its index; for those with a trial also the index of its grid. */
  private readonly guideOf: Int32Array;
  private readonly gridOf: Int32Array;
  private readonly mass: HypergeometricMass;
  private readonly guides: Guides;
  private readonly trials: Trials;

  constructor(plan: DrawPlan) {
    const columns = plan.columnTotals.length;
    const size = plan.rowTotals.length * columns;
    const laws: GuidedLaws[] = [];
    const grids: TrialGrid[] = [];
    this.samplers = new Uint8Array(size);
    this.guideOf = new Int32Array(size);
    this.gridOf = new Int32Array(size);
    plan.cells.forEach((row, i) => {
      row.forEach((cell, j) => {
        const at = (plan.labelRows + i) * columns + j;
        if (cell.sampler === 'guide') {
          this.samplers[at] = cell.key === 'marked' ? byMarkedGuide : byDrawnGuide;
          this.guideOf[at] = laws.push(cell.laws) - 1;
        } else if (cell.sampler === 'trial') {
          this.samplers[at] = cell.key === 'marked' ? byMarkedTrial : byDrawnTrial;
          this.guideOf[at] = laws.push(cell.laws) - 1;
          this.gridOf[at] = grids.push(cell.grid) - 1;
        } else {
          this.samplers[at] = cell.sampler === 'rejection' ? byRejection : byInversion;
        }
      });
    });
    this.mass = new HypergeometricMass(plan.total);
    this.guides = new Guides(laws);
    this.trials = new Trials(plan.total, grids);
  }

  /**
   * The count of cell `at` (row-major in the order of drawing): of `left` units in this and later rows and columns, `marked`
   * are in its column and `drawn` in its row.
   */
  draw(source: UniformSource, at: number, left: number, marked: number, drawn: number): number {
    const sampler = this.samplers[at]!;
    let count = -1;
    if (sampler <= byDrawnGuide) {
      const value = sampler === byMarkedGuide ? marked : drawn;
      count = this.guides.select(source, this.guideOf[at]!, value, source.word());
    } else if (sampler === byMarkedTrial) {
      do count = this.guides.select(source, this.guideOf[at]!, marked, source.word());
      while (count >= 0 && !this.trials.keeps(source, this.gridOf[at]!, left - marked, drawn - count));
    } else if (sampler === byDrawnTrial) {
      do count = this.guides.select(source, this.guideOf[at]!, drawn, source.word());
      while (count >= 0 && !this.trials.keeps(source, this.gridOf[at]!, left - drawn, marked - count));
    } else if (sampler === byRejection) {
      return reject(source, this.mass, left, marked, drawn);
    }
    return count < 0 ? invert(source, source.word(), this.mass, left, marked, drawn) : count;
  }
}
