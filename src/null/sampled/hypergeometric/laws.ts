// Whole laws laid out as lists, for look-up tables built before the first draw: hypergeometric and binomial counts.
// Each is built outwards from a mode by the ratio of neighbours and divided by its sum, so that no factorial is needed.
import { modeOf } from './spread.js';

/** P(least), P(least + 1), ...; adds up to 1. What is left out at the ends is below 1e-18 of the largest. */
export interface Law {
  readonly least: number;
  readonly masses: readonly number[];
}

const negligible = 1e-18;

/** How many of `drawn` units, taken without replacement from `total` of which `marked` are marked, carry the mark. */
export function hypergeometricLaw(total: number, marked: number, drawn: number): Law {
  const rest = total - marked - drawn;
  return outwards(
    modeOf(total, marked, drawn),
    (x) => ((marked - x) * (drawn - x)) / ((x + 1) * (rest + x + 1)),
    (x) => (x * (rest + x)) / ((marked - x + 1) * (drawn - x + 1)),
  );
}

/** How many of `units` fall to a side that each joins with probability `share`, 0 < share < 1. */
export function binomialLaw(units: number, share: number): Law {
  const odds = share / (1 - share);
  return outwards(
    Math.floor((units + 1) * share),
    (x) => ((units - x) / (x + 1)) * odds,
    (x) => x / (units - x + 1) / odds,
  );
}

/** @param up P(x + 1)/P(x), 0 at the end of the support; @param down P(x - 1)/P(x) likewise. */
function outwards(mode: number, up: (x: number) => number, down: (x: number) => number): Law {
  const above: number[] = [];
  for (let x = mode, mass = up(mode); mass > negligible; mass *= up(x)) {
    above.push(mass);
    x++;
  }
  const below: number[] = [];
  for (let x = mode, mass = down(mode); mass > negligible; mass *= down(x)) {
    below.push(mass);
    x--;
  }
  const masses = [...below.reverse(), 1, ...above];
  const sum = masses.reduce((total, mass) => total + mass, 0);
  return { least: mode - below.length, masses: masses.map((mass) => mass / sum) };
}
