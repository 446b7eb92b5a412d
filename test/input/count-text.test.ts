import { describe, expect, it } from 'vitest';
import { isMissingText, isNumberLike, parseCount } from '../../src/input/count-text.js';

describe('a count in digits is read', () => {
  it.each([
    ['0', 0],
    ['8', 8],
    [' 8 ', 8],
    ['\u00a08\t', 8],
    ['007', 7],
    ['9007199254740991', 9007199254740991],
    ['0000000000000000000000000000012', 12],
  ])('%j is %d, typed or in a file', (text, count) => {
    expect(parseCount(text, 'typed')).toBe(count);
    expect(parseCount(text, 'file')).toBe(count);
  });
});

describe('decimals that are all 0 are read in a file only', () => {
  it.each([
    ['12.0', 12],
    ['12.00', 12],
    ['0.000', 0],
    ['1234.000', 1234],
    ['9007199254740991.0', 9007199254740991],
  ])('%j is %d in a file and refused when typed', (text, count) => {
    expect(parseCount(text, 'file')).toBe(count);
    expect(parseCount(text, 'typed')).toMatchObject({ code: expect.stringMatching(/^(decimal|ambiguous)-count$/) });
  });
});

describe('every other way of writing a number is refused by name, with what to write', () => {
  it.each([
    ['-1', 'negative-count', 'counts are whole numbers from 0 upwards'],
    ['−1', 'negative-count', 'counts are whole numbers from 0 upwards'],
    ['-0', 'negative-count', 'counts are whole numbers from 0 upwards'],
    ['+3', 'signed-count', 'write 3 without it'],
    ['12.5', 'fractional-count', 'give counts, not means, rates or weights'],
    ['12,5', 'fractional-count', 'give counts, not means, rates or weights'],
    ['.5', 'fractional-count', 'give counts, not means, rates or weights'],
    [
      '1.234',
      'fractional-count',
      'give counts, not means, rates or weights; write 1234 if the point separates thousands',
    ],
    ['12.000', 'ambiguous-count', 'write 12 or 12000, whichever is meant'],
    ['1.000.000', 'ambiguous-count', 'write 1 or 1000000, whichever is meant'],
    ['12.', 'decimal-count', 'write 12'],
    ['12,0', 'decimal-count', 'write 12'],
    ['1e3', 'exponent-count', 'write the count in digits only: 1000'],
    ['1.5E1', 'exponent-count', 'write the count in digits only: 15'],
    ['1e300', 'exponent-count', 'write the count in digits only'],
    ['1,234', 'grouped-count', 'write 1234'],
    ['1 234', 'grouped-count', 'write 1234'],
    ["1'234'567", 'grouped-count', 'write 1234567'],
    ['1.234.567', 'grouped-count', 'write 1234567'],
    ['12%', 'percentage', 'give the counts themselves, not shares of them'],
  ])('%j: %s, hint: %s', (text, code, hint) => {
    expect(parseCount(text, 'file')).toMatchObject({ code, hint });
    expect(parseCount(text, 'typed')).toMatchObject({ code, hint });
  });

  it.each([
    ['', 'empty-count'],
    ['  ', 'empty-count'],
    ['NA', 'missing-count'],
    ['#N/A', 'missing-count'],
    ['x', 'not-a-count'],
    ['8x', 'not-a-count'],
    ['0x1F', 'not-a-count'],
    ['1/2', 'not-a-count'],
    ['Infinity', 'not-a-count'],
    ['８', 'not-a-count'],
    ['9007199254740992', 'count-overflow'],
    ['9007199254740992.0', 'count-overflow'],
    ['1'.repeat(400), 'count-overflow'],
  ])('%j: %s', (text, code) => {
    expect(parseCount(text, 'file')).toMatchObject({ code });
  });
});

describe('what is meant as missing, and what as a number', () => {
  it.each(['', ' ', 'NA', 'na', 'N/A', 'n/a', 'NaN', 'nan', 'null', 'NULL', ' Null '])('%j is missing', (text) => {
    expect(isMissingText(text)).toBe(true);
  });
  it.each(['0', 'none', 'nil', 'N.A.', 'missing', '-', 'N A', 'nulls'])('%j is not missing', (text) => {
    expect(isMissingText(text)).toBe(false);
  });
  it.each(['8', '-1', '12.5', '1e3', '1,234', '+3', '12%', '.5', '12.'])('%j was meant as a number', (text) => {
    expect(isNumberLike(text)).toBe(true);
  });
  it.each(['', '10-19', '<5', '65+', '2024-05-01', 'e3', 'x', '1.2.3', 'NA'])('%j was not', (text) => {
    expect(isNumberLike(text)).toBe(false);
  });
});
