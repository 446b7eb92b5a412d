import { describe, expect, it } from 'vitest';
import { lackingIn } from '../../../src/report/pictures/lacking-glyphs.js';

/** Draws what is in its font, and a box for all else. */
const rendererWith =
  (font: string) =>
  (words: string): Uint8Array =>
    Uint8Array.from(
      [...words]
        .flatMap((character) => (font.includes(character) ? [character.codePointAt(0)! % 251] : [255]))
        .slice(0, 1),
    );

describe('characters that no font draws', () => {
  it('are those that look as a character of no font looks, each once, in their order', () => {
    expect(lackingIn('病院の病', rendererWith('の'))).toEqual(['病', '院']);
    expect(lackingIn('病院', rendererWith('病院'))).toEqual([]);
  });

  it('are not asked for among letters and signs that the shipped fonts have, nor among marks and controls', () => {
    const never = (): Uint8Array => {
      throw new Error('asked');
    };
    expect(lackingIn('naïve Ωμέγα больница − … "x" ← e\u0301 \u200d', never)).toEqual([]);
  });
});
