// How a report is dressed: width, colour, and CSV safety, from the options and the terminal.
import { plainPainter, type Painter, type ReportSettings } from '../../report/format.js';
import type { Shell } from '../shell.js';

export interface LookValues {
  readonly width?: number;
  readonly color?: true;
  readonly noColor?: true;
  readonly rawCsv?: true;
  readonly histogram?: true;
  readonly output?: string;
}

export async function lookFor(values: LookValues, shell: Shell): Promise<ReportSettings> {
  return {
    width: values.width ?? shell.columns,
    paint: wantsColour(values, shell) ? await chalkPainter() : plainPainter,
    rawCsv: values.rawCsv ?? false,
    ...(values.histogram ? { histogram: canShowBlocks(shell) ? ('blocks' as const) : ('ascii' as const) } : {}),
  };
}

/** Block characters need UTF-8, by the first of these that is set, and a terminal that is more than a teletype. */
function canShowBlocks({ environment: { LC_ALL, LC_CTYPE, LANG, TERM } }: Shell): boolean {
  return TERM !== 'dumb' && /utf-?8/i.test(LC_ALL || LC_CTYPE || LANG || '');
}

/** An explicit flag beats the environment; else colour needs a terminal that wants it (no-color.org). */
function wantsColour({ color, noColor, output }: LookValues, shell: Shell): boolean {
  if (noColor) return false;
  if (color) return true;
  const { NO_COLOR: refusal, TERM: terminal } = shell.environment;
  const toTerminal = shell.stdoutIsTerminal && (output === undefined || output === '-');
  return toTerminal && !refusal && terminal !== 'dumb';
}

/** Magenta can be read on light grounds and on dark ones. Built once, at the level we decided on: left alone, chalk would look at the words of the command line itself. */
async function chalkPainter(): Promise<Painter> {
  const { Chalk } = await import('chalk');
  const chalk = new Chalk({ level: 1 });
  return { bold: (text) => chalk.bold(text), warn: (text) => chalk.magenta(text) };
}
