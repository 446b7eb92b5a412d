// Bins as they are drawn: those that reach to infinity are as wide as the others.
import type { NullSummary } from '../../result/result.js';

export interface DrawnBin {
  readonly left: number;
  readonly right: number;
  readonly mass: number;
  readonly inTail: number;
  readonly approximation?: number | undefined;
  /** Reaches to infinity. */
  readonly isOpen: boolean;
}

export function finiteBins({ bins }: NullSummary): DrawnBin[] {
  const widths = bins.map(({ from, to }) => (typeof from === 'number' && typeof to === 'number' ? to - from : 0));
  const usual = Math.max(...widths) || 1;
  return bins.map(({ from, to, mass, inTail, approximation }) => {
    const left = typeof from === 'number' ? from : typeof to === 'number' ? to - usual : 0;
    const isOpen = typeof from !== 'number' || typeof to !== 'number';
    return { left, right: typeof to === 'number' ? to : left + usual, mass, inTail, approximation, isOpen };
  });
}
