import { describe, expect, it } from 'vitest';
import { quoted, shown, shownJson } from '../../src/result/label-words.js';

describe('labels in words', () => {
  it.each([
    ['\u001b[31mred\u001b[0m', '\\x1b[31mred\\x1b[0m', 'a terminal escape'],
    ['a\nb\tc\rd', 'a\\nb\\tc\\rd', 'line feed, tab and carriage return'],
    ['\u009b2J', '\\x9b2J', 'an eight-bit control'],
    ['x\u007f', 'x\\x7f', 'delete'],
    ['\u202egnp.exe', '\\u202egnp.exe', 'a character that reverses reading'],
    ['a\u2066b\u200fc', 'a\\u2066b\\u200fc', 'isolates and marks of direction'],
    ['a\u200bb\ufeffc\u00add', 'a\\u200bb\\ufeffc\\xadd', 'characters that cannot be seen'],
    ['a\u{e0041}', 'a\\u{e0041}', 'an invisible tag'],
    ['a\ud800b', 'a\\ud800b', 'half a surrogate pair'],
    ['a\u2028b', 'a\\u2028b', 'a line separator'],
  ])('spells out what acts unseen in %j', (label, wanted) => {
    expect(shown(label)).toBe(wanted);
  });

  it.each(['North ward', 'Ärzte', '返品', 'نمی‌دانم', '👩‍👩‍👧', '❤️', 'C:\\new', 'say "yes"'])(
    'leaves %s as it came',
    (label) => {
      expect(shown(label)).toBe(label);
    },
  );

  it('puts a label of a sentence in double quotes', () => {
    expect(quoted('north\u0007')).toBe('"north\\x07"');
  });

  it('keeps the meaning of a JSON text whose characters it escapes', () => {
    const value = { label: 'a\u009b\u202e\u{e0041}\u2028b', lines: ['\n'] };
    const safe = shownJson(JSON.stringify(value, null, 2));
    expect(safe).toMatch(/^[\n\x20-\x7e]*$/);
    expect(JSON.parse(safe)).toEqual(value);
  });
});
