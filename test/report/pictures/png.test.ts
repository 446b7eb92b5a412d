import { describe, expect, it } from 'vitest';
import { Resvg } from '@resvg/resvg-js';
import { analyse } from '../../../src/analyse.js';
import { drawPicture } from '../../../src/report/pictures/pictures.js';
import { pngFrom } from '../../../src/report/pictures/png.js';

/** Share of dark pixels in a part of a png, given in shares of its sides. */
function inkIn(png: Uint8Array, [left, top, right, bottom]: readonly [number, number, number, number]): number {
  const wrapped = `<svg xmlns="http://www.w3.org/2000/svg" width="340" height="260"><image width="340" height="260" preserveAspectRatio="none" href="data:image/png;base64,${Buffer.from(png).toString('base64')}"/></svg>`;
  const { pixels, width, height } = new Resvg(wrapped).render();
  let dark = 0;
  let all = 0;
  for (let y = Math.floor(top * height); y < bottom * height; y++) {
    for (let x = Math.floor(left * width); x < right * width; x++) {
      all++;
      if (pixels[4 * (y * width + x)]! < 128) dark++;
    }
  }
  return dark / all;
}

describe('a png', () => {
  it('has ink where its words stand', async () => {
    const result = await analyse(
      {
        counts: [
          [8, 2],
          [1, 9],
        ],
      },
      { nullSummary: true },
    );
    const svg = drawPicture(result, 'null');
    const { bytes: png } = await pngFrom(svg);
    expect([...png.slice(1, 4)]).toEqual([...Buffer.from('PNG')]);
    const captionPlace = [0.02, 0.02, 0.8, 0.09] as const;
    expect(inkIn(png, captionPlace)).toBeGreaterThan(0.05);
    // The same place of the same picture without its words is bare, so it is the words that were seen.
    const bare = await pngFrom(svg.replace(/<text.*?<\/text>/g, ''));
    expect(inkIn(bare.bytes, captionPlace)).toBe(0);
  });

  const mosaicOf = async (label: string): Promise<string> =>
    drawPicture(
      await analyse({
        counts: [
          [8, 2],
          [1, 9],
        ],
        rowLabels: [label, 'b'],
      }),
      'mosaic',
    );
  const labelPlace = [0, 0.2, 0.3, 0.6] as const;

  it('lacks nothing that its own fonts have: accents, Greek, Cyrillic, Arabic, Hebrew, signs', async () => {
    for (const label of ['naïveté', 'Ωμέγα', 'больница', 'مستشفى', 'חולים', '≥ 5 µg', 'a…b']) {
      expect((await pngFrom(await mosaicOf(label))).lacking, label).toEqual([]);
    }
  });

  it('leaves ink for letters that they lack, from a font of the machine or as a box, and tells which are boxes', async () => {
    const svg = await mosaicOf('病院');
    const written = await pngFrom(svg);
    expect([[], ['病', '院']]).toContainEqual(written.lacking);
    const bare = await pngFrom(svg.replace('>病院</text>', '></text>'));
    expect(inkIn(written.bytes, labelPlace)).toBeGreaterThan(inkIn(bare.bytes, labelPlace));
    // Kept by the standard for private use: no font at hand draws it.
    expect((await pngFrom(await mosaicOf('\u{f1234}x'))).lacking).toEqual(['\u{f1234}']);
    const cuneiform = await pngFrom(await mosaicOf('𒀀𒀁𒀀'));
    expect([[], ['𒀀', '𒀁']]).toContainEqual(cuneiform.lacking);
  });
});
