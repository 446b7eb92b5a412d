import fc from 'fast-check';
import stringWidth from 'string-width';
import { expect, it } from 'vitest';
import { breakAt, cutInside, cutTo, displayWidth } from '../../src/report/display-width.js';
import { shown } from '../../src/result/label-words.js';

// Scripts on which terminals agree; on Indic conjuncts they do not, and the wider count is taken.
const written = [
  'ward 7',
  'Größe',
  'возраст',
  'ηλικία',
  '返品',
  'ｱｲｳ',
  'かな',
  '한국',
  '\u1112\u1161\u11ab',
  'ไทย',
  'עברית',
  'فارسی',
  'e\u0301',
  '👍🏽',
  '👩‍👩‍👧',
  '🇫🇷',
  '❤️',
  '1️⃣',
  '½ °C',
  '…',
];
const anyLabel = fc.array(fc.constantFrom(...written), { maxLength: 8 }).map((words) => words.join(' '));
const anyText = fc.string({ unit: 'binary', maxLength: 30 }).map(shown);
const width = fc.integer({ min: 2, max: 20 });

// string-width (Sorhus and contributors) is the second opinion: what it finds wider than we do would break a column.
it('labels as people write them take as many columns as string-width finds', () => {
  fc.assert(fc.property(anyLabel, (text) => void expect(displayWidth(text)).toBe(stringWidth(text))));
});

it('no text at all is counted narrower than string-width finds it', () => {
  fc.assert(
    fc.property(anyText, (text) => void expect(displayWidth(text)).toBeGreaterThanOrEqual(stringWidth(text))),
    { numRuns: 2000 },
  );
});

it('a cut label keeps to the width', () => {
  fc.assert(
    fc.property(anyText, width, (text, columns) => {
      expect(displayWidth(cutTo(text, columns))).toBeLessThanOrEqual(columns);
      expect(displayWidth(cutInside(text, columns))).toBeLessThanOrEqual(columns);
    }),
  );
});

it('breaking loses nothing and keeps to the width', () => {
  fc.assert(
    fc.property(anyLabel, width, (text, columns) => {
      const pieces = breakAt(text, columns);
      expect(pieces.join('')).toBe(text);
      for (const piece of pieces) expect(displayWidth(piece)).toBeLessThanOrEqual(columns);
    }),
  );
});
