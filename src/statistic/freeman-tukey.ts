// The Freeman-Tukey statistic in its plain form, a sum of squared differences of roots: the power-divergence statistic with
// lambda = -1/2 (Cressie & Read 1984). Freeman & Tukey's (1950) own deviates, sqrt n + sqrt(n + 1) - sqrt(4 e + 1), differ from
// it by terms that vanish for large counts.
import type { Statistic } from './contract.js';
import { bindPower } from './power-divergence.js';

export const freemanTukey: Statistic = {
  name: 'freeman-tukey',
  sided: 'upper',
  shape: 'any',
  words: 'the Freeman-Tukey statistic (squared differences of square roots)',
  formula: '4 sum over cells of (sqrt n_ij - sqrt e_ij)^2',
  range: '0 (counts as expected) to 8 n',
  source: 'after Freeman & Tukey (1950), in the form of Cressie & Read (1984)',
  limit: 'chi-square',
  bind: (live, roles) => bindPower(live, roles, { numerator: -1n, denominator: 2n }),
};
