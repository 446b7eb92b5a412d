// The law of |2X - m| for X binomial (m, 1/2): how unevenly m discordant pairs were split, whichever way.
import { DoubleDouble } from '../numeric/double-double.js';
import { OutwardWalk } from './fair-coin.js';

export interface SplitLaw {
  readonly m: number;
  /** Differences m mod 2, m mod 2 + 2, ..., the last one at most `most`. */
  readonly differences: Float64Array;
  /** Their probabilities, both ways together. */
  readonly masses: Float64Array;
  /** Probability of a larger difference. */
  readonly beyond: number;
}

/** @param most differences beyond this are added up to one number. Exact while no mass falls below 1e-290. */
export function splitLaw(m: number, most: number): SplitLaw {
  const walk = new OutwardWalk(m);
  const differences: number[] = [];
  const masses: number[] = [];
  const beyond = new DoubleDouble();
  do {
    const difference = 2 * walk.x - m;
    const mass = (difference === 0 ? 1 : 2) * walk.mass.value * 2 ** Math.max(-1070, walk.exponent);
    if (difference <= most) {
      differences.push(difference);
      masses.push(mass);
    } else {
      beyond.add(mass);
      if (mass < beyond.value * 2 ** -60) break;
    }
  } while (walk.step());
  return { m, differences: Float64Array.from(differences), masses: Float64Array.from(masses), beyond: beyond.value };
}
