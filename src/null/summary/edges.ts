// Where the bins of a summary lie: of equal width, so that heights compare; on the steps of a statistic that moves in equal
// steps, so that no bin holds more of them than another; else with an edge at the observed value, where the tail begins.

export interface Atom {
  readonly value: number;
  readonly mass: number;
  /** The part of the mass that is at least as extreme as the observed table. */
  readonly inTail: number;
}

/** Bins k = 0 ... number - 1 from `start + k width` to `start + (k + 1) width`; the outermost take what lies beyond. */
export interface Edges {
  readonly start: number;
  readonly width: number;
  readonly number: number;
}

/** Shares of the law beyond either end that the outermost bins gather. */
const beyondEnds = 5e-4;
const fewestBins = 8;
const mostBins = 36;
/** Values whose difference is rounding alone, relative to the spread of all. */
const rounding = 1e-9;

/**
 * @param atoms distinct finite values in ascending order, with a positive mass each; at least one.
 * @param outward the direction in which the tail leaves the observed value: 1 or -1.
 */
export function edgesFor(atoms: readonly Atom[], observed: number, outward: 1 | -1): Edges {
  const [low, high] = bulk(atoms);
  const wanted = Math.min(mostBins, Math.max(fewestBins, atoms.length));
  const span = high - low;
  if (span === 0) return { start: low - 0.5, width: 1, number: 1 };
  const step = equalStep(atoms);
  const edge = step === undefined ? observed : observed - (outward * step) / 2;
  const width = step === undefined ? span / wanted : step * Math.max(1, Math.ceil(span / step / mostBins));
  // Bins are counted from the edge, which need not lie among them.
  const first = Math.floor((low - edge) / width + rounding);
  const last = Math.ceil((high - edge) / width - rounding);
  const number = Math.max(1, last - first + (isOnEdge(high, edge, width) && outward === 1 ? 1 : 0));
  return { start: edge + first * width, width, number };
}

const isOnEdge = (value: number, edge: number, width: number): boolean => {
  const steps = (value - edge) / width;
  return Math.abs(steps - Math.round(steps)) < 1e-6;
};

/** The range that all but a thousandth of the law keeps to. */
function bulk(atoms: readonly Atom[]): [number, number] {
  const whole = atoms.reduce((sum, { mass }) => sum + mass, 0);
  const from = (ordered: readonly Atom[]): number => {
    let passed = 0;
    return ordered.find(({ mass }) => (passed += mass) > beyondEnds * whole)?.value ?? ordered.at(-1)!.value;
  };
  return [from(atoms), from([...atoms].reverse())];
}

/** The step of which every difference is a multiple; undefined where there is none, or it is too fine to see. */
function equalStep(atoms: readonly Atom[]): number | undefined {
  if (atoms.length < 3) return undefined;
  const span = atoms.at(-1)!.value - atoms[0]!.value;
  const gaps = atoms.slice(1).map(({ value }, k) => value - atoms[k]!.value);
  const step = gaps.reduce((least, gap) => Math.min(least, gap), Infinity);
  if (span / step > 2000) return undefined;
  return gaps.every((gap) => Math.abs(gap / step - Math.round(gap / step)) < 1e-6) ? step : undefined;
}

/** Values that differ by rounding alone become one atom; ascending. */
export function atomsOf(found: Map<number, { mass: number; inTail: number }>): Atom[] {
  const sorted = [...found].sort(([a], [b]) => a - b);
  const finite = sorted.filter(([value]) => Number.isFinite(value));
  const span = finite.length === 0 ? 0 : finite.at(-1)![0] - finite[0]![0];
  const atoms: { value: number; mass: number; inTail: number }[] = [];
  for (const [value, { mass, inTail }] of sorted) {
    const last = atoms.at(-1);
    if (last !== undefined && value - last.value <= span * rounding) {
      last.mass += mass;
      last.inTail += inTail;
    } else atoms.push({ value, mass, inTail });
  }
  return atoms;
}
