// What separates the fields of a file: comma, semicolon, tab or pipe. The rule:
// the candidate whose number per line, outside quotes, is the same on most lines as on the first, where it must occur;
// between equals the more frequent, then the order comma, semicolon, tab, pipe. None occurs: comma.
// Blank lines and lines that begin with # are not looked at.
import type { Delimiter } from './read-table.js';

/** Candidates in their order of preference. */
export const delimiterText: Readonly<Record<Delimiter, string>> = { comma: ',', semicolon: ';', tab: '\t', pipe: '|' };

const candidates = Object.entries(delimiterText) as [Delimiter, string][];

/** As many lines as the rule looks at; a file's habits show well before that. */
const mostLines = 200;

/** @param sample the beginning of the text; a last line without its line break counts only when it is the only one or `whole` */
export function detectDelimiter(sample: string, whole: boolean): Delimiter {
  const lines = countsPerLine(sample, whole);
  const first = lines[0];
  if (first === undefined) return 'comma';
  let best: Delimiter = 'comma';
  let bestAgreeing = 0;
  let bestCount = 0;
  candidates.forEach(([name], index) => {
    const count = first[index]!;
    if (count === 0) return;
    const agreeing = lines.filter((line) => line[index] === count).length;
    if (agreeing > bestAgreeing || (agreeing === bestAgreeing && count > bestCount)) {
      best = name;
      bestAgreeing = agreeing;
      bestCount = count;
    }
  });
  return best;
}

/** For each line that holds data, how often each candidate stands outside quotes. A line break in quotes ends no line. */
function countsPerLine(sample: string, whole: boolean): number[][] {
  const lines: number[][] = [];
  let counts = candidates.map(() => 0);
  let quoted = false;
  let atFieldStart = true;
  let blank = true;
  let comment = false;
  const endLine = (): void => {
    if (!blank && !comment) lines.push(counts);
    counts = candidates.map(() => 0);
    quoted = comment = false;
    atFieldStart = blank = true;
  };
  for (const character of sample) {
    if (!quoted && (character === '\n' || character === '\r')) {
      endLine();
      if (lines.length === mostLines) return lines;
      continue;
    }
    comment ||= blank && character === '#';
    if (comment) continue;
    const index = candidates.findIndex(([, text]) => text === character);
    if (quoted) quoted = character !== '"';
    else if (index >= 0) counts[index]!++;
    // A quote opens only where a field begins; `5" pipe` opens none. A doubled quote closes and opens again at once.
    else if (character === '"' && atFieldStart) quoted = true;
    atFieldStart = index >= 0 || character === '"' || (atFieldStart && character === ' ');
    blank = blank && character === ' ';
  }
  if (whole || lines.length === 0) endLine();
  return lines;
}
