import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { spreadLabels } from '../../../src/report/pictures/spread-labels.js';

describe('labels beside narrow things', () => {
  it('stay where they are when they have room', () => {
    expect(spreadLabels([10, 40, 80], [12, 12, 12], 0, 100)).toEqual([10, 40, 80]);
  });

  it('are moved down, and up again from the bottom', () => {
    expect(spreadLabels([50, 51, 52], [10, 10, 10], 0, 100)).toEqual([50, 60, 70]);
    expect(spreadLabels([96, 97, 98], [10, 10, 10], 0, 100)).toEqual([75, 85, 95]);
  });

  it('never lie over each other and keep their order and their room', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 200, noNaN: true }), { minLength: 1, maxLength: 15 }),
        (middles) => {
          const wished = [...middles].sort((a, b) => a - b);
          const places = spreadLabels(
            wished,
            wished.map(() => 12),
            0,
            200,
          );
          places.forEach((place, k) => {
            expect(place).toBeGreaterThanOrEqual(6 - 1e-9);
            expect(place).toBeLessThanOrEqual(194 + 1e-9);
            if (k > 0) expect(place - places[k - 1]!).toBeGreaterThanOrEqual(12 - 1e-9);
          });
        },
      ),
    );
  });
});
