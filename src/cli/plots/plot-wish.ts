// --plot [PICTURE=]FILE: which picture goes where. The end of the file's name says in which form.
import { pictureNames, type PictureName } from '../../report/pictures/names.js';
import { usageProblem } from '../../problem/problem.js';
import { nameHint } from '../../problem/suggest.js';
import type { CheckValue } from '../arguments/check-value.js';

export interface PlotWish<N extends string = PictureName> {
  readonly picture: N;
  readonly path: string;
  readonly form: 'svg' | 'png';
}

/** One entry of --plot; the first name stands where none is given. `./` in front forces a path that holds =. */
export const plotWish =
  <N extends string>(names: readonly N[]): CheckValue<PlotWish<N>> =>
  (text, flag) => {
    const [, named, rest] = /^([\w-]+)=(.*)$/s.exec(text) ?? [undefined, undefined, text];
    const picture = names.find((name) => name === (named ?? names[0]));
    if (picture === undefined) {
      throw usageProblem({
        code: 'unknown-picture',
        message: `there is no picture named "${named}"`,
        place: flag,
        hint: nameHint(named!, names),
      });
    }
    const form = /\.(svg|png)$/i.exec(rest)?.[1]?.toLowerCase();
    if (form !== 'svg' && form !== 'png') {
      throw usageProblem({
        code: 'unknown-picture-form',
        message: `"${rest}" does not end in .svg or .png`,
        place: flag,
        hint: `for example ${flag} ${named === undefined ? '' : `${named}=`}${rest === '' ? picture : rest.replace(/\.\w*$/, '')}.svg`,
      });
    }
    return { picture, path: rest, form };
  };

export const resultPlot = plotWish(pictureNames);
