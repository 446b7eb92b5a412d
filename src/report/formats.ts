// Every format there is: help, checks and tests read this list; adding one is one file and one line here.
import type { Result } from '../result/result.js';
import { csv } from './csv.js';
import { defaultSettings, type Format, type ReportSettings } from './format.js';
import { json } from './json.js';
import { markdown } from './markdown.js';
import { text } from './text.js';

export const formats = { text, json, csv, markdown } as const satisfies Record<string, Format>;
export type FormatName = keyof typeof formats;
export const formatNames = Object.keys(formats) as FormatName[];

/** What the command takes: html as well, whose pictures are loaded only where it is written (`html/report.ts`). */
export type ReportFormat = FormatName | 'html';
export const reportFormats: readonly ReportFormat[] = [...formatNames, 'html'];

/** A result in one of the formats: a whole document, ending in a line feed. */
export const render = (result: Result, format: FormatName, settings: Partial<ReportSettings> = {}): string =>
  formats[format].write(result, { ...defaultSettings, ...settings });
