// What every format is to the rest of the program: Result in, string out, under the same few settings.
import type { Characters } from './histogram.js';
import type { Result } from '../result/result.js';

/** Colour that a report may use; it only repeats what words already say. Strings in, strings out. */
export interface Painter {
  bold(text: string): string;
  /** For what a reader must not miss. */
  warn(text: string): string;
}

const asItIs = (text: string): string => text;

/** No colour at all. */
export const plainPainter: Painter = { bold: asItIs, warn: asItIs };

export interface ReportSettings {
  /** Columns of the text report, from 40; anything less is taken as 40. */
  readonly width: number;
  readonly paint: Painter;
  /** CSV: leave text cells as they are, even those that a spreadsheet would run as a formula. */
  readonly rawCsv: boolean;
  /** Text and markdown: draw how chance alone spreads the statistic, in these characters. Default: not drawn. */
  readonly histogram?: Characters;
}

export const defaultSettings: ReportSettings = { width: 80, paint: plainPainter, rawCsv: false };

export interface Format {
  /** For help: what it is good for. */
  readonly words: string;
  /** The whole document, ending in a line feed. */
  write(result: Result, settings: ReportSettings): string;
}
