// The probability of the observed tables themselves, one a stratum, given every margin.
import type { Mass } from '../null/contract.js';
import { pointMass } from '../null/exact/point-mass.js';
import type { Layer } from './general/problem.js';

export function pointOf(layers: readonly Layer[]): Mass {
  return layers.reduce(
    (all, { live }) => {
      const one = pointMass(live);
      return { value: all.value * one.value, log10: all.log10 + one.log10 };
    },
    { value: 1, log10: 0 },
  );
}
