// A picture as png: rendered by resvg with the DejaVu fonts, both from packages, so that it looks the same everywhere and
// needs no font of the machine.
import { createRequire } from 'node:module';

/** Dots to a unit of the picture: at 85 mm this prints with 406 dots to the inch. */
const dotsPerUnit = 4;
const fonts = ['DejaVuSans.ttf', 'DejaVuSans-Bold.ttf'];

/** @returns the bytes of a png, its paper white. */
export async function pngFrom(svg: string): Promise<Uint8Array> {
  const { Resvg } = await import('@resvg/resvg-js');
  const { resolve } = createRequire(import.meta.url);
  const [, across] = /viewBox="0 0 (\d+)/.exec(svg)!;
  return new Resvg(svg, {
    fitTo: { mode: 'width', value: Number(across) * dotsPerUnit },
    background: 'white',
    font: {
      loadSystemFonts: false,
      fontFiles: fonts.map((file) => resolve(`dejavu-fonts-ttf/ttf/${file}`)),
      defaultFontFamily: 'DejaVu Sans',
    },
  })
    .render()
    .asPng();
}
