// The one parser of a count's text, for rows typed in and for files. Only plain digits are a count; each other way of
// writing something number-like is refused by name, because a guess here (1,234? 1.234?) would change the answer in silence.

/** Where the text stands: only a file may say `12.0`, which is how spreadsheets and data frames export whole numbers. */
export type CountOrigin = 'typed' | 'file';

/** Why a text is no count. */
export interface CountFault {
  readonly code: string;
  /** What is wrong with the value, as the end of a sentence that begins with it: `"-1"` + ` is negative`. */
  readonly what: string;
  readonly hint: string;
}

const plainDigits = /^[0-9]+$/;
const wholeWithZeros = /^([0-9]+)\.(0+)$/;
/** `12.000`: twelve to one reader, twelve thousand to another. */
const readTwoWays = /^[1-9][0-9]{0,2}(\.000)+$/;
const grouped = /^[0-9]{1,3}([,.'’_ \u00a0\u202f][0-9]{3})+$/;
/** Counts set apart by something other than a comma: `8;2`, `8 2`. */
export const severalCounts = /^[0-9]+([;|\s]\s*[0-9]+)+$/;
const missingWords = new Set(['na', 'n/a', '#n/a', 'nan', 'null']);

/** A cell that cannot be: no unit could ever fall into it. */
export const isImpossibleText = (text: string): boolean => text.trim() === '-';

/** Missing values as people and programs write them: nothing but blanks, NA, N/A, NaN, null, in any case. */
export function isMissingText(text: string): boolean {
  const trimmed = text.trim();
  return trimmed.length <= 4 && (trimmed === '' || missingWords.has(trimmed.toLowerCase()));
}

/**
 * True for text that was meant as a number, a count or not: `8`, `-1`, `12.5`, `1e3`, `1,234`, `12%`.
 * Labels made of digits and more, such as the age band `10-19`, are not.
 */
export const isNumberLike = (text: string): boolean =>
  /^[+\-−]?([0-9]+([.,][0-9]*)?|[.,][0-9]+|[0-9]{1,3}([,.'’_ \u00a0\u202f][0-9]{3})+([.,][0-9]+)?)(e[+-]?[0-9]+)?%?$/i.test(
    text.trim(),
  );

/**
 * The count a text stands for, 0 to 2^53 - 1, or why it is none. Blanks around it are ignored.
 */
export function parseCount(text: string, origin: CountOrigin): number | CountFault {
  const trimmed = text.trim();
  if (plainDigits.test(trimmed)) return withinRange(trimmed);
  if (readTwoWays.test(trimmed)) return twoReadings(trimmed);
  const zeros = wholeWithZeros.exec(trimmed);
  if (origin === 'file' && zeros !== null) return withinRange(zeros[1]!);
  return faultOf(trimmed, origin);
}

function withinRange(digits: string): number | CountFault {
  // Past 2^53 - 1 a double rounds to 2^53 or more, so the comparison is safe for any number of digits.
  const count = Number(digits);
  if (count <= Number.MAX_SAFE_INTEGER) return count;
  return {
    code: 'count-overflow',
    what: `is more than 2^53 - 1 (${Number.MAX_SAFE_INTEGER})`,
    hint: 'keepsum counts exactly up to that total; check for a column of identifiers read as counts',
  };
}

const twoReadings = (text: string): CountFault => ({
  code: 'ambiguous-count',
  what: 'can be read in two ways, by the decimal point or by the thousand',
  hint: `write ${text.slice(0, text.indexOf('.'))} or ${text.replaceAll('.', '')}, whichever is meant`,
});

function faultOf(text: string, origin: CountOrigin): CountFault {
  if (text === '') {
    return {
      code: 'empty-count',
      what: 'is empty',
      hint: 'write 0 where nobody was counted; a count that is not known cannot be tested',
    };
  }
  if (isMissingText(text) || text.toLowerCase() === '#n/a') {
    return {
      code: 'missing-count',
      what: 'stands for a missing value, not for a count',
      hint: 'write 0 where nobody was counted; a count that is not known cannot be tested',
    };
  }
  if (!isNumberLike(text)) {
    const hint =
      origin === 'typed' && severalCounts.test(text)
        ? 'separate the counts of a row by commas, and rows by blanks: 8,2 1,9'
        : 'write each count in digits only, such as 8';
    return { code: 'not-a-count', what: 'is not a whole number', hint };
  }
  return numberFault(text);
}

/** Text that is a number, but not a plain whole one. */
function numberFault(text: string): CountFault {
  const bare = text.replace(/^[+\-−]/, '');
  if (/^[-−]/.test(text)) {
    return { code: 'negative-count', what: 'is negative', hint: 'counts are whole numbers from 0 upwards' };
  }
  if (bare.endsWith('%')) {
    return { code: 'percentage', what: 'is a percentage', hint: 'give the counts themselves, not shares of them' };
  }
  if (/e/i.test(bare)) {
    const value = Number(bare);
    const digits = Number.isSafeInteger(value) ? `: ${value}` : '';
    return {
      code: 'exponent-count',
      what: 'is written with an exponent',
      hint: `write the count in digits only${digits}`,
    };
  }
  const digits = bare.replace(/[^0-9]/g, '');
  const pointAndThree = /^[0-9]{1,3}\.[0-9]{3}$/.test(bare);
  if (grouped.test(bare) && !pointAndThree) {
    return { code: 'grouped-count', what: 'holds a separator of thousands', hint: `write ${digits}` };
  }
  if (text !== bare) {
    return { code: 'signed-count', what: 'carries a sign', hint: `write ${bare} without it` };
  }
  if (/^[0-9]+[.,]0*$/.test(bare)) {
    return { code: 'decimal-count', what: 'is written with decimals', hint: `write ${bare.replace(/[.,].*$/, '')}` };
  }
  return {
    code: 'fractional-count',
    what: 'is not a whole number',
    hint: `give counts, not means, rates or weights${pointAndThree ? `; write ${digits} if the point separates thousands` : ''}`,
  };
}
