import { describe, expect, it } from 'vitest';
import { fold } from '../../src/report/fold.js';

describe('folding', () => {
  it('breaks lines at spaces and indents those that follow deeper', () => {
    expect(fold('one two three four', 11, { first: 1, rest: 3 })).toEqual([' one two', '   three', '   four']);
  });

  it('breaks a word that is wider than a line', () => {
    expect(fold('a abcdefghij b', 4)).toEqual(['a', 'abcd', 'efgh', 'ij b']);
  });

  it('makes one empty line of an empty text', () => {
    expect(fold('', 10)).toEqual(['']);
  });
});
