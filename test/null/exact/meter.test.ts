// What holds exact work within its bound, and tells how far it is.
import { describe, expect, it } from 'vitest';
import { Meter } from '../../../src/null/exact/meter.js';
import { OutOfReach } from '../../../src/null/exact/out-of-reach.js';

describe('counted work', () => {
  it('may come up to its bound, in steps of any size, and not past it', () => {
    for (const step of [1, 7, 1000]) {
      const meter = new Meter(21_000);
      for (let spent = 0; spent < 21_000; spent += step) meter.spend(step);
      expect(meter.spent).toBe(21_000);
      expect(() => meter.spend(1)).toThrow(OutOfReach);
    }
  });

  it('has no bound unless one is given, and tells now and then what was spent', () => {
    const told: number[] = [];
    const meter = new Meter(undefined, (units) => told.push(units));
    for (let k = 0; k < 5000; k++) meter.spend(1000);
    expect(told.length).toBeGreaterThan(2);
    expect(told).toEqual([...told].sort((a, b) => a - b));
    expect(told.at(-1)).toBeLessThanOrEqual(5_000_000);
  });
});
