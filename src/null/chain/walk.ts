// A walk over the tables with given margins and impossible cells whose law at rest is the conditional one, proportional to prod 1/n! (Metropolis
// et al. 1953): a move and a size chosen alike in both directions, taken with the probability that keeps the balance. Each step is as
// likely backwards, so the same steps run the chain backwards.
import { logFactorial } from '../../numeric/log-factorial.js';
import type { UniformSource } from '../../random/stream.js';
import type { Move } from './moves.js';

export class Walk {
  readonly counts: Float64Array;
  private readonly sizes: readonly number[];

  /** @param expected sets the reach of each move: about two and a half standard deviations along it. */
  constructor(
    start: Float64Array,
    private readonly moves: readonly Move[],
    expected: Float64Array,
  ) {
    this.counts = start.slice();
    this.sizes = moves.map((move) => {
      const information = move.reduce((sum, cell) => sum + 1 / expected[cell]!, 0);
      return Math.max(1, Math.round(2.5 / Math.sqrt(information)));
    });
  }

  step(source: UniformSource): void {
    const { counts } = this;
    const chosen = Math.floor(source.uniform() * this.moves.length);
    const move = this.moves[chosen]!;
    const size = 1 + Math.floor(source.uniform() * this.sizes[chosen]!);
    const signed = source.word() < 0 ? -size : size;
    let ln = 0;
    for (let k = 0; k < move.length; k++) {
      const count = counts[move[k]!]!;
      const next = k % 2 === 0 ? count + signed : count - signed;
      if (next < 0) return;
      ln += logFactorial(count) - logFactorial(next);
    }
    if (ln < 0 && Math.log(source.uniform() + 2 ** -33) > ln) return;
    for (let k = 0; k < move.length; k++) counts[move[k]!]! += k % 2 === 0 ? signed : -signed;
  }
}
