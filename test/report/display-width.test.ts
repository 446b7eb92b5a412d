import { describe, expect, it } from 'vitest';
import { breakAt, cutInside, cutTo, displayWidth, padLeft, padRight } from '../../src/report/display-width.js';

describe('columns of a terminal', () => {
  it.each([
    ['healed', 6],
    ['Größe', 5],
    ['возраст', 7],
    ['返品', 4],
    ['ｱ', 1],
    ['e\u0301', 1],
    ['👩‍👩‍👧', 2],
    ['🇫🇷', 2],
    ['❤️', 2],
    ['1️⃣', 2],
    ['…', 1],
    ['', 0],
  ])('%s takes %d', (text, columns) => {
    expect(displayWidth(text)).toBe(columns);
  });

  it('cuts at the end, an ellipsis within the width', () => {
    expect(cutTo('returned because of a torn seam', 12)).toBe('returned be…');
    expect(cutTo('returned', 8)).toBe('returned');
    expect(cutTo('not given', 5)).toBe('not…');
  });

  it('cuts inside, so that endings can be told apart', () => {
    expect(cutInside('treatment group A', 9)).toBe('trea…up A');
    expect(cutInside('short', 9)).toBe('short');
  });

  it('never cuts a wide character in half', () => {
    expect(cutTo('返品理由', 4)).toBe('返…');
    expect(breakAt('返品理由', 5)).toEqual(['返品', '理由']);
  });

  it('pads by columns, not by characters', () => {
    expect(padRight('返品', 6)).toBe('返品  ');
    expect(padLeft('返品', 6)).toBe('  返品');
    expect(padLeft('longer', 3)).toBe('longer');
  });
});
