// Pictures into files: every path is tried before the work, every file put in place only when whole.
import { usageProblem } from '../../problem/problem.js';
import { toFile } from '../streams/output-file.js';
import type { PlotWish } from './plot-wish.js';

/**
 * @param note told what a reader of a picture will miss.
 * @returns what writes all of them, in the order given; it is told how to draw the SVG document of a picture.
 * @throws Problem (usage) where two name the same file, or one cannot be written.
 */
export async function plotFiles<N extends string>(
  wishes: readonly PlotWish<N>[],
  inputPath: string | null,
  output: string | undefined,
  note: (words: string) => Promise<void>,
): Promise<(draw: (picture: N) => string) => Promise<void>> {
  const paths = [output, ...wishes.map(({ path }) => path)];
  const twice = wishes.find(({ path }, k) => paths.indexOf(path) < k + 1);
  if (twice !== undefined) {
    throw usageProblem({
      code: 'same-file-twice',
      message: `"${twice.path}" is to be written twice`,
      place: '--plot',
      hint: 'give each picture a file of its own',
    });
  }
  const destinations: Awaited<ReturnType<typeof toFile>>[] = [];
  for (const { path } of wishes) destinations.push(await toFile(path, inputPath, '--plot'));
  return async (draw) => {
    for (const [k, { picture, form }] of wishes.entries()) {
      const svg = `${draw(picture)}\n`;
      if (form === 'svg') {
        await destinations[k]!.write(svg);
        continue;
      }
      const { bytes, lacking } = await (await import('../../report/pictures/png.js')).pngFrom(svg);
      await destinations[k]!.write(bytes);
      if (lacking.length > 0) await note(lackWords(lacking, wishes[k]!.path));
    }
  };
}

const lackWords = (lacking: readonly string[], path: string): string => {
  const some = `${lacking.slice(0, 8).join(' ')}${lacking.length > 8 ? ' ...' : ''}`;
  const boxes = lacking.length === 1 ? 'a box stands' : 'boxes stand';
  return `in ${path} ${boxes} for ${some}, which no font of this machine has; install one that does, or give a path that ends in .svg`;
};
