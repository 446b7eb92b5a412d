// Limits of one look against arithmetic with 60 digits: the three beta functions by the log-gamma function of mpmath 1.3, the
// limits by 190 bisections of ln(mixture / likelihood) = -ln(risk). Written to 17 digits.
import { describe, expect, it } from 'vitest';
import { mixtureAround } from '../../../src/pvalue/sequential/beta-mixture.js';
import { limitsAt } from '../../../src/pvalue/sequential/limits.js';
import { relativeDifference } from '../../helpers/tables.js';

describe('the limits of one look', () => {
  it.each([
    // hits, draws, level, risk, lower limit, upper limit
    [0, 1000, 0.05, 0.0005, 0, 0.011233033925947604],
    [1, 1000, 0.05, 0.0005, 6.1572357350024446e-9, 0.014585177781580252],
    [37, 2000, 0.01, 0.0001, 0.0072983491141802673, 0.037413070402678168],
    [500, 1000, 0.05, 0.0005, 0.4162652268587003, 0.5837347731412997],
    [1000, 1000, 0.05, 0.0005, 0.98548339453768542, 1],
    [4712, 1e6, 0.005, 0.00005, 0.0043715707756972802, 0.0050695744369908248],
    [12, 40, 0.3, 0.003, 0.098093686487634252, 0.57838707363728457],
    [3, 1e12, 0.05, 0.0005, 9.0453235607694459e-16, 3.1361970014839511e-11],
    [5e10, 1e12, 0.05, 0.0005, 0.049998666040949023, 0.050001333981528577],
    [1e12 - 5, 1e12, 0.05, 0.0005, 0.99999999995995034, 0.99999999999998666],
  ])('%d of %d around %d at risk %d', (hits, draws, level, risk, lower, upper) => {
    const found = limitsAt(mixtureAround(level), risk, hits, draws);
    expect(relativeDifference(found[0], lower)).toBeLessThan(2e-13);
    expect(relativeDifference(found[1], upper)).toBeLessThan(2e-13);
  });
});
