// A picture as png: rendered by resvg with the DejaVu fonts, both from packages, so that it looks the same everywhere and
// needs no font of the machine. Only words in characters that those fonts lack (such as Chinese) take the machine's own.
import { createRequire } from 'node:module';
import type { Resvg, ResvgRenderOptions } from '@resvg/resvg-js';
import { lackingIn, type Renders } from './lacking-glyphs.js';

/** Dots to a unit of the picture: at 85 mm this prints with 406 dots to the inch. */
const dotsPerUnit = 4;
const fonts = ['DejaVuSans.ttf', 'DejaVuSans-Bold.ttf'];
const family = 'DejaVu Sans';

export interface Png {
  /** Its paper is white. */
  readonly bytes: Uint8Array;
  /** Characters of its words that no font at hand can draw; a box stands for each. */
  readonly lacking: readonly string[];
}

export async function pngFrom(svg: string): Promise<Png> {
  const { Resvg: Renderer } = await import('@resvg/resvg-js');
  const words = [...svg.matchAll(/<text[^>]*>([^<]*)</g)].map(([, text]) => text).join('');
  const beyondOurs = lackingIn(words, rendersWith(Renderer, false));
  const own = beyondOurs.length === 0;
  const lacking = own ? [] : lackingIn(beyondOurs.join(''), rendersWith(Renderer, true));
  const [, across] = /viewBox="0 0 (\d+)/.exec(svg)!;
  const settings: ResvgRenderOptions = {
    fitTo: { mode: 'width', value: Number(across) * dotsPerUnit },
    background: 'white',
    font: fontSettings(!own),
  };
  return { bytes: new Renderer(svg, settings).render().asPng(), lacking };
}

function fontSettings(ofTheMachine: boolean): NonNullable<ResvgRenderOptions['font']> {
  const { resolve } = createRequire(import.meta.url);
  return {
    loadSystemFonts: ofTheMachine,
    fontFiles: fonts.map((file) => resolve(`dejavu-fonts-ttf/ttf/${file}`)),
    defaultFontFamily: family,
  };
}

const rendersWith =
  (Renderer: typeof Resvg, ofTheMachine: boolean): Renders =>
  (few) => {
    const small = `<svg xmlns="http://www.w3.org/2000/svg" width="${24 * few.length + 8}" height="24"><text x="2" y="18" font-family="${family}" font-size="16">${few}</text></svg>`;
    return new Renderer(small, { font: fontSettings(ofTheMachine) }).render().pixels;
  };
