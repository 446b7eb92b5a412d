// What a block gives depends on its stream alone: a sampler that has drawn before and one made for the block agree. (Once,
// a law laid out on first use took one random word more than later: threads then changed digits.)
import { describe, expect, it } from 'vitest';
import { prepareSampler } from '../../../src/null/sampled/sample-cuts.js';
import { blockStream } from '../../../src/random/stream.js';
import { liveFrom, orderingOf } from '../../helpers/tables.js';

const tables: Record<string, number[][]> = {
  'a 4x4 of 303': [[18, 20, 15, 5], [19, 24, 24, 29], [26, 17, 14, 14], [17, 24, 10, 16]], // prettier-ignore
  'a 4x4 of 592': [[68, 20, 15, 5], [119, 84, 54, 29], [26, 17, 14, 14], [7, 94, 10, 16]], // prettier-ignore
  'a rare row': [[2, 3, 5, 6, 8], [5998, 7997, 4995, 5994, 2992]], // prettier-ignore
  'a sparse 4x5': [[3, 1, 0, 2, 0], [0, 2, 4, 0, 1], [1, 0, 2, 3, 2], [2, 1, 0, 1, 4]], // prettier-ignore
  'a 3x3 of 45,000': [[5100, 4900, 5000], [4950, 5050, 5020], [4980, 5010, 4990]], // prettier-ignore
  'a 5x6 of 900': Array.from({ length: 5 }, (_, i) => Array.from({ length: 6 }, (__, j) => 20 + 4 * i + j)),
  'a 3x3 of 10^9': [[1e8, 1e8, 1e8], [1e8, 2e8, 1e8], [1e8, 1e8, 1e8]], // prettier-ignore
  'a 2x2': [[8, 2], [1, 9]], // prettier-ignore
  'a 6x8 of 60': Array.from({ length: 6 }, (_, i) => Array.from({ length: 8 }, (__, j) => ((i * 3 + j * 5) % 7) % 3)),
};
const blocks = 60;
const draws = 200;

describe('a block of draws', () => {
  it.each(Object.entries(tables))('is the same from a sampler old and new: %s', (name, counts) => {
    const live = liveFrom(counts);
    const orderings = [orderingOf(live, 'pearson', 'upper')];
    const old = prepareSampler(live, orderings);
    const [mine, yours] = [new Float64Array(live.rows * live.columns), new Float64Array(live.rows * live.columns)];
    for (let block = 0; block < blocks; block++) {
      const fresh = prepareSampler(live, orderings);
      expect(old.countBlock(blockStream(name, '', block), draws)).toEqual(
        fresh.countBlock(blockStream(name, '', block), draws),
      );
      const [ours, theirs] = [blockStream(name, 't', block), blockStream(name, 't', block)];
      for (let draw = 0; draw < 20; draw++) {
        old.drawTable(ours, mine);
        prepareSampler(live, []).drawTable(theirs, yours);
        expect(mine).toEqual(yours);
      }
    }
  });
});
