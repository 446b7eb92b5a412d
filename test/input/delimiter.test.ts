import { describe, expect, it } from 'vitest';
import { detectDelimiter } from '../../src/input/delimiter.js';

describe('the separator is the candidate that keeps its number from line to line', () => {
  it.each([
    ['a,b\n1,2\n', 'comma'],
    ['a;b\n1;2\n', 'semicolon'],
    ['a\tb\n1\t2\n', 'tab'],
    ['a|b\n1|2\n', 'pipe'],
    ['', 'comma'],
    ['a\n1\n', 'comma'],
    ['site;north, west;south\nx;1;2\ny;3;4\n', 'semicolon'],
    ['a;b\n1,5;2,5\n3,5;4,5\n', 'semicolon'],
    ['"a,b,c";d\n"1,2,3";4\n', 'semicolon'],
    ['"x\n,,,"\t"y"\n1\t2\n', 'tab'],
    ['# a,b,c,d\n# "e\na;b\n1;2\n', 'semicolon'],
    ['  # a,b,c,d\n\n   \na;b\n1;2\n', 'semicolon'],
    ['5" pipe;b\n6" pipe;2\n', 'semicolon'],
    ['"say ""a,b""";c\n1;2\n', 'semicolon'],
    ['a,b;c\r\n1,2;3\r\n', 'comma'],
    ['a,b,c;d\n1,2,3;4\n', 'comma'],
  ])('%j: %s', (text, delimiter) => {
    expect(detectDelimiter(text, true)).toBe(delimiter);
  });

  it('a line cut off at the end of the sample is not looked at', () => {
    expect(detectDelimiter('a,b;c\n1,2;3\n4,', false)).toBe('comma');
    expect(detectDelimiter('a;b\n1;', false)).toBe('semicolon');
    expect(detectDelimiter('a;b', false)).toBe('semicolon');
  });
});
