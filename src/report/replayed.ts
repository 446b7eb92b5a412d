// What a replay found, for a screen.
import { quoted, shown } from '../result/label-words.js';
import { countWords } from '../result/number-words.js';
import type { ReplayReport } from '../result/replay-declaration.js';
import { fold } from './fold.js';

/** Of one record, and of a file. */
const mostDifferences = 10;
const mostRecords = 20;

export function replayedText(report: ReplayReport, width: number): string {
  const { records, same, passedOver, differing, against } = report;
  const said = (words: string, indent = 0): string[] => fold(shown(words), width, { first: indent, rest: indent + 2 });
  const lines = [
    ...said(
      differing.length === 0
        ? records === 1
          ? 'Replayed: every digit is the same.'
          : `Replayed: every digit of ${countWords(records)} results is the same.`
        : `Replayed: ${countWords(same)} of ${countWords(records)} results came out the same, ${countWords(differing.length)} did not.`,
    ),
    ...(passedOver === 0
      ? []
      : said(`${countWords(passedOver)} error lines hold nothing to replay and were passed over.`)),
    ...(against === undefined ? [] : said(againstWords(against))),
    ...differing
      .slice(0, mostRecords)
      .flatMap(({ key, madeWith, differences }) => [
        ...said(
          `${key === null ? 'The result' : quoted(key)}${madeWith === null ? '' : `, made with version ${madeWith}`}:`,
        ),
        ...differences
          .slice(0, mostDifferences)
          .flatMap(({ field, recorded, obtained }) =>
            said(`${field}: recorded ${value(recorded)}, obtained ${value(obtained)}`, 2),
          ),
        ...(differences.length > mostDifferences
          ? said(`and ${differences.length - mostDifferences} more fields`, 2)
          : []),
      ]),
    ...(differing.length > mostRecords
      ? said(`and ${countWords(differing.length - mostRecords)} more results; --format json lists all`)
      : []),
  ];
  return `${lines.join('\n')}\n`;
}

const againstWords = ({ sha256, recorded, same }: NonNullable<ReplayReport['against']>): string =>
  same
    ? 'The data file has the SHA-256 of the record.'
    : recorded === null
      ? 'The record names no data file: its counts were typed in or passed by a program.'
      : `The data file is not the one of the record: its SHA-256 is ${sha256}, recorded is ${recorded}.`;

const value = (one: unknown): string => {
  if (one === undefined) return 'nothing';
  const text = JSON.stringify(one);
  return text.length > 120 ? `${text.slice(0, 119)}…` : text;
};
