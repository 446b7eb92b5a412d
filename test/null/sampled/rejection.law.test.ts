// The hat and the squeeze of Hormann (1993) were made for binomial laws. That they hold for hypergeometric ones from a variance of 9 on
// is shown here outcome by outcome over laws of every skewness, up to where the normal limit has set in.
import { describe, expect, it } from 'vitest';
import {
  hatCurve,
  hatHeight,
  hatSlope,
  leastVarianceForRejection,
  squeezeEdge,
  squeezeHeight,
} from '../../../src/null/sampled/hypergeometric/rejection.js';
import { varianceOf } from '../../../src/null/sampled/hypergeometric/spread.js';

interface Bounds {
  /** Largest P(x)/P(mode) over the hat: at most 1, or the law is cut off where it rises above. */
  readonly aboveHat: number;
  /** Smallest P(x)/P(mode) over hat times squeeze, where the squeeze accepts: at least 1, or too much is accepted. */
  readonly aboveSqueeze: number;
}

/** P(x)/P(mode) is compared with the hat over all proposals v that lead to x: those with floor((2 a/(1/2 - |v|) + b) v + c) = x. */
function bounds(total: number, marked: number, drawn: number): Bounds {
  const deviation = Math.sqrt(varianceOf(total, marked, drawn));
  const mean = drawn * (marked / total);
  const slope = hatSlope(deviation);
  const curve = hatCurve(slope);
  const height = hatHeight(deviation, slope);
  const rest = total - marked - drawn;
  const centre = mean + 0.5;
  const stretch = (edge: number): number => curve / edge ** 2 + slope;
  let aboveHat = 0;
  let aboveSqueeze = Infinity;
  const look = (x: number, ratio: number): void => {
    const ends = [edgeAt(x - centre, curve, slope), edgeAt(x + 1 - centre, curve, slope)];
    const nearest = x <= centre && x + 1 > centre ? 0.5 : Math.max(...ends);
    aboveHat = Math.max(aboveHat, (ratio * stretch(Math.min(...ends))) / height);
    if (nearest >= squeezeEdge) {
      aboveSqueeze = Math.min(aboveSqueeze, (ratio * stretch(nearest)) / height / squeezeHeight(slope));
    }
  };
  const mode = Math.floor((drawn + 1) * ((marked + 1) / (total + 2)));
  const far = 14 * deviation;
  // The first outcome outside the support is looked at too: the squeeze must not accept it.
  for (let x = mode, ratio = 1, before = 1; before > 0 && x < mode + far; x++) {
    look(x, ratio);
    before = ratio;
    ratio *= ((marked - x) * (drawn - x)) / ((x + 1) * (rest + x + 1));
  }
  for (let x = mode, ratio = 1, before = 1; before > 0 && x > mode - far; x--) {
    if (x < mode) look(x, ratio);
    before = ratio;
    ratio *= (x * (rest + x)) / ((marked - x + 1) * (drawn - x + 1));
  }
  return { aboveHat, aboveSqueeze };
}

/** 1/2 - |v| for the v that is taken to a distance from the centre. */
function edgeAt(distance: number, curve: number, slope: number): number {
  const y = Math.abs(distance);
  const half = curve + slope / 4 + y / 2;
  return 0.5 - (half - Math.sqrt(half * half - (slope * y) / 2)) / slope;
}

const shares = [0.5, 0.3, 0.1, 0.03, 0.01, 0.001, 1e-5, 0.7, 0.97];
const variances = [9, 9.3, 10, 11, 12.5, 14, 16, 20, 25, 36, 50, 100, 225, 1000, 1e4, 1e5, 1e6];

describe('transformed rejection', () => {
  it('has a hat above and a squeeze below every hypergeometric law of variance 9 and more', () => {
    let laws = 0;
    for (const variance of variances) {
      for (const marked of shares) {
        for (const drawn of shares) {
          // Totals that give this variance, and a few more so that the fractions of the mean go round.
          const base = variance / (marked * (1 - marked) * drawn * (1 - drawn));
          for (let k = 0; k < 8; k++) {
            const total = Math.ceil(base * (1 + 0.004 * k)) + 2;
            const law = [total, Math.round(total * marked) + (k % 3), Math.round(total * drawn) + (k % 2)] as const;
            if (total > 2 ** 50 || varianceOf(...law) < leastVarianceForRejection) continue;
            const { aboveHat, aboveSqueeze } = bounds(...law);
            laws++;
            if (aboveHat > 0.9985 || aboveSqueeze < 1.002) {
              expect.fail(`law ${law.join()}: ${aboveHat} of the hat, ${aboveSqueeze} of the squeeze`);
            }
          }
        }
      }
    }
    expect(laws).toBeGreaterThan(5000);
  });

  it('would not be sound for variances of 4: the bound is needed', () => {
    expect(bounds(495, 446, 50).aboveHat).toBeGreaterThan(1);
  });
});
