// The pictures of a result, by name; adding one is a file and an entry here. Loaded only by runs that draw.
import type { Result } from '../../result/result.js';
import { svgDocument, type Picture } from './frame.js';
import { forest, mostStrata } from './forest.js';
import { mosaic, mostColumns, mostRows } from './mosaic.js';
import { nullDistribution } from './null-distribution.js';
import type { PictureName } from './names.js';

/** What keeps a result from having a picture, and what to do about it. */
export interface Lack {
  readonly because: string;
  readonly hint: string;
}

interface Entry {
  /** Undefined where it can be drawn. */
  lacks(result: Result): Lack | undefined;
  draw(result: Result, id: string): Picture;
}

const entries: Readonly<Record<PictureName, Entry>> = {
  null: {
    lacks: ({ nullSummary, plan }) =>
      nullSummary !== undefined && nullSummary.bins.length > 0
        ? undefined
        : {
            because:
              plan.fixed === 'pairs'
                ? 'the law of changes in pairs is not summed up for pictures'
                : 'the result holds no summary of what chance alone does',
            hint: 'only a table with two rows and two columns that hold counts can have one; --plot mosaic=FILE.svg draws the counts',
          },
    draw: (result, id) => nullDistribution(result, result.nullSummary!, id),
  },
  mosaic: {
    lacks: ({ input: { total, rowLabels, columnLabels } }) =>
      total === 0
        ? { because: 'the table holds no counts', hint: 'leave the picture out' }
        : rowLabels.length > mostRows || columnLabels.length > mostColumns
          ? {
              because: `more than ${mostRows} rows or ${mostColumns} columns make none that can be read`,
              hint: 'leave the picture out, or put levels together with --merge',
            }
          : undefined,
    draw: mosaic,
  },
  strata: {
    lacks: ({ strata }) =>
      strata?.oddsRatios === undefined
        ? { because: 'it has no strata of 2x2 tables', hint: 'name what tells the strata apart with --strata' }
        : strata.labels.length > mostStrata
          ? { because: `more than ${mostStrata} strata make no picture`, hint: 'the json format holds all of them' }
          : undefined,
    draw: forest,
  },
};

/** Undefined where the result has what the picture shows. */
export const lackOf = (result: Result, name: PictureName): Lack | undefined => entries[name].lacks(result);

/**
 * One picture of a result as an SVG document.
 * @param id parts the names inside from those of other pictures on the same page; letters, digits and hyphens.
 * @throws TypeError when the result does not hold what the picture shows; `lackOf` tells.
 */
export function drawPicture(result: Result, name: PictureName, id: string = `keepsum-${name}`): string {
  const lack = lackOf(result, name);
  if (lack !== undefined) throw new TypeError(`there is no picture "${name}" of this result: ${lack.because}`);
  return svgDocument(entries[name].draw(result, id), id);
}
