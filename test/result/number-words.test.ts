import { describe, expect, it } from 'vitest';
import {
  countWords,
  levelWords,
  percentWords,
  pointsWords,
  probabilityWords,
  roundedTo,
  statisticValueWords,
  tinyWords,
} from '../../src/result/number-words.js';

describe('probabilities', () => {
  it.each([
    [0.005477494641581329, '0.00548'],
    [0.05, '0.0500'],
    [0.2441559705698148, '0.244'],
    [0.00012345, '0.000123'],
    [3.1481e-8, '3.1e-8'],
    [3.14e-12, '3.1e-12'],
    [2.2250738585072014e-308, '2.2e-308'],
    [0.99994, 'above 0.999'],
    [0.9994, '0.999'],
    [1, '1'],
    [0, '0'],
  ])('%d is shown as %s', (p, words) => {
    expect(probabilityWords(p)).toBe(words);
  });

  it('tells the size of a p below the smallest double', () => {
    expect(tinyWords(-412.34)).toBe('about 10^-412.3');
  });
});

describe('numbers with an error', () => {
  it.each([
    [0.006, 0.0383, '0.038'],
    [0.0006, 0.03829, '0.0383'],
    [0.00006, 0.038294, '0.0383'],
    [0.002, 0.0996, '0.100'],
    [0.0096, 0.0383, '0.04'],
    [0.05, 0.0383, '0.04'],
    [1e-5, 2e-5, '2e-5'],
    [1e-6, 9.41e-5, '9.4e-5'],
    [0.0001, 0.99991, 'above 0.999'],
    [0.2, 0.97, '1.0'],
    [0.01, 1, '1'],
  ])('with an error of %d, %d is shown as %s', (error, value, words) => {
    expect(roundedTo(error, value)).toBe(words);
  });
});

describe('other numbers', () => {
  it.each([
    [0, '0'],
    [999, '999'],
    [1000, '1,000'],
    [100_000, '100,000'],
    [Number.MAX_SAFE_INTEGER, '9,007,199,254,740,991'],
  ])('the count %d is shown as %s', (count, words) => {
    expect(countWords(count)).toBe(words);
  });

  it.each([
    [4.427188724235731, '4.427'],
    [1908.57, '1,909'],
    [56_234.1, '56,230'],
    [-0.25, '-0.2500'],
    [3.2e-9, '3.200e-9'],
    [1.5e12, '1.500e12'],
    [0, '0'],
    ['infinity', 'infinite'],
    ['-infinity', 'minus infinity'],
  ] as const)('the statistic %s is shown as %s', (value, words) => {
    expect(statisticValueWords(value)).toBe(words);
  });

  it.each([
    [0, '0%'],
    [1, '100%'],
    [0.8, '80%'],
    [1 / 3, '33.3%'],
    [12 / 28_000, '0.043%'],
    [9_999 / 10_000, '99.99%'],
    [0.9996, '99.96%'],
  ])('the share %d is shown as %s', (share, words) => {
    expect(percentWords(share)).toBe(words);
  });

  it('shows a difference of shares in percentage points, with its sign', () => {
    expect(pointsWords(0.8 - 0.1)).toBe('70 percentage points');
    expect(pointsWords(-0.0004)).toBe('-0.04 percentage points');
    expect(pointsWords(0)).toBe('0 percentage points');
  });

  it('shows a level as a whole percentage where it is one', () => {
    expect([0.99, 0.95, 0.999, 0.9999].map(levelWords)).toEqual(['99%', '95%', '99.9%', '99.99%']);
  });
});
