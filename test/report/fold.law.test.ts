import fc from 'fast-check';
import { expect, it } from 'vitest';
import { displayWidth } from '../../src/report/display-width.js';
import { fold } from '../../src/report/fold.js';
import { shown } from '../../src/result/label-words.js';

const anyText = fc.string({ unit: 'grapheme', maxLength: 200 }).map(shown);
const width = fc.integer({ min: 10, max: 40 });
const bare = (text: string): string => text.replaceAll(' ', '');

it('no folded line exceeds the width, and nothing but spaces is lost', () => {
  fc.assert(
    fc.property(anyText, width, (text, columns) => {
      const lines = fold(text, columns, { first: 2, rest: 4 });
      for (const line of lines) expect(displayWidth(line)).toBeLessThanOrEqual(columns);
      expect(bare(lines.map((line) => line.trim()).join(''))).toBe(
        bare(
          text
            .split(' ')
            .map((word) => word.trim())
            .join(' '),
        ),
      );
    }),
  );
});
