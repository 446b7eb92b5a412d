import fc from 'fast-check';
import { expect, it } from 'vitest';
import { shown, shownJson } from '../../src/result/label-words.js';

const anyText = fc.string({ unit: 'binary', maxLength: 40 });
const actsUnseen = /[\p{Cc}\p{Cs}\p{Zl}\p{Zp}\u061c\u200e\u200f\u202a-\u202e\u2066-\u2069]/u;

it('no control, separator or direction character survives in any text', () => {
  fc.assert(
    fc.property(anyText, (text) => !actsUnseen.test(shown(text))),
    { numRuns: 2000 },
  );
});

it('showing a text twice changes nothing more', () => {
  fc.assert(fc.property(anyText, (text) => shown(shown(text)) === shown(text)));
});

it('a JSON text means the same after its characters are escaped', () => {
  fc.assert(
    fc.property(anyText, (text) => {
      expect(JSON.parse(shownJson(JSON.stringify({ text })))).toEqual({ text });
    }),
  );
});
