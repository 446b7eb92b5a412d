// The same for two unknown proportions: a polynomial with non-negative Bernstein coefficients on a square, its largest value
// between two proven bounds. A box is halved along the side on which its coefficients differ most.
import type { CertifiedMaximum } from './certified-maximum.js';

export interface MaximumOnSquare extends Omit<CertifiedMaximum, 'at'> {
  readonly at: readonly [number, number];
}

interface Box {
  readonly from: readonly [number, number];
  readonly width: readonly [number, number];
  /** (degree + 1)^2, row by row; rows go with the first proportion. */
  readonly coefficients: Float64Array;
  readonly largest: number;
  readonly depth: number;
}

const floorShare = 1e-30;

/**
 * @param halvings most boxes to halve, each (degree + 1) degree^2 / 2 means. The bounds hold whenever it ends.
 * @param isSymmetric the values at q and 1 - q are the same for each of the two proportions: a quarter is enough.
 */
export function certifiedMaximumOnSquare(
  coefficients: Float64Array,
  degree: number,
  relativeError: number,
  { gap, halvings, isSymmetric }: { gap: number; halvings: number; isSymmetric: boolean },
): MaximumOnSquare {
  const size = degree + 1;
  const largest = greatest(coefficients);
  let best = 0;
  let at: readonly [number, number] = [0, 0];
  let deepest = 0;
  const corners = ({ coefficients: c, from, width }: Box): void => {
    for (const [i, j] of [
      [0, 0],
      [0, 1],
      [1, 0],
      [1, 1],
    ] as const) {
      const value = c[i * degree * size + j * degree]!;
      if (value <= best) continue;
      best = value;
      at = [from[0] + i * width[0], from[1] + j * width[1]];
    }
  };
  const isOpen = (box: Box): boolean => box.largest > best * (1 + gap);
  const raised = coefficients.map((c) => Math.max(c, largest * floorShare));
  const whole: Box = { from: [0, 0], width: [1, 1], coefficients: raised, largest, depth: 0 };
  let boxes = isSymmetric ? [halves(halves(whole, 0, size)[0], 1, size)[0]] : [whole];
  corners(boxes[0]!);
  for (let done = 0; done < halvings; done++) {
    let top = boxes.length - 1;
    for (let k = 0; k < boxes.length; k++) if (boxes[k]!.largest > boxes[top]!.largest) top = k;
    if (top < 0 || !isOpen(boxes[top]!)) break;
    const pair = halves(boxes[top]!, roughest(boxes[top]!, size), size);
    pair.forEach(corners);
    deepest = Math.max(deepest, pair[0].depth);
    boxes[top] = boxes.at(-1)!;
    boxes.pop();
    boxes.push(...pair.filter(isOpen));
    if (done % 64 === 0) boxes = boxes.filter(isOpen);
  }
  const upper = boxes.reduce((most, box) => Math.max(most, box.largest), best * (1 + gap));
  const error = 1.01 * ((degree + 2) * (deepest + 1) * 2 ** -53 + relativeError);
  return { upper: upper * (1 + error), lower: best * (1 - error), at };
}

/** 0: along the first proportion, 1: along the second. */
function roughest({ coefficients: c }: Box, size: number): 0 | 1 {
  let first = 0;
  let second = 0;
  for (let i = 1; i < size; i++) {
    for (let j = 1; j < size; j++) {
      const here = c[i * size + j]!;
      first = Math.max(first, Math.abs(here - c[(i - 1) * size + j]!));
      second = Math.max(second, Math.abs(here - c[i * size + j - 1]!));
    }
  }
  return first >= second ? 0 : 1;
}

function halves({ from, width, coefficients, depth }: Box, side: 0 | 1, size: number): [Box, Box] {
  const right = coefficients.slice();
  const left = new Float64Array(right.length);
  const [across, along] = side === 0 ? [1, size] : [size, 1];
  for (let line = 0; line < size; line++) {
    const start = line * across;
    left[start] = right[start]!;
    for (let level = 1; level < size; level++) {
      let here = right[start]!;
      for (let i = 0, k = start; i < size - level; i++, k += along) {
        const next = right[k + along]!;
        right[k] = (here + next) * 0.5;
        here = next;
      }
      left[start + level * along] = right[start]!;
    }
  }
  const half: [number, number] = side === 0 ? [width[0] / 2, width[1]] : [width[0], width[1] / 2];
  const middle: [number, number] = side === 0 ? [from[0] + half[0], from[1]] : [from[0], from[1] + half[1]];
  const box = (origin: readonly [number, number], c: Float64Array): Box => ({
    from: origin,
    width: half,
    coefficients: c,
    largest: greatest(c),
    depth: depth + 1,
  });
  return [box(from, left), box(middle, right)];
}

function greatest(values: Float64Array): number {
  let most = 0;
  for (const value of values) if (value > most) most = value;
  return most;
}
