// Pictures into files: every path is tried before the work, every file put in place only when whole.
import { usageProblem } from '../../problem/problem.js';
import { toFile } from '../streams/output-file.js';
import type { PlotWish } from './plot-wish.js';

/**
 * @param draw gives the SVG document of a picture.
 * @returns what writes all of them, in the order given.
 * @throws Problem (usage) where two name the same file, or one cannot be written.
 */
export async function plotFiles<N extends string>(
  wishes: readonly PlotWish<N>[],
  inputPath: string | null,
  output: string | undefined,
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
      const content = form === 'svg' ? svg : await (await import('../../report/pictures/png.js')).pngFrom(svg);
      await destinations[k]!.write(content);
    }
  };
}
