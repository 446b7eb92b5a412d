// Where a field stands in the text it came from: line and column for messages. Used only once something is wrong:
// the reader counts records, and this walks the text again, by the same rules of quotes, blank lines and comments, to that one.

/** Line and column count from 1; a column is one character (code point), not one byte. */
export interface TextPlace {
  readonly line: number;
  readonly column: number;
}

const isBlank = (character: string): boolean => character.trim() === '';

/**
 * Finds the first character of one field (its opening quote, if it has one; blanks before it are skipped). For a
 * field past the end of its record: the end of that record. Text may come in pieces, cut anywhere.
 * @param record, field  indexes from 0; lines without text and comment lines are no records
 */
export class FieldPlace {
  private line = 1;
  private column = 0;
  private record = 0;
  private field = 0;
  private quoted = false;
  /** A quote inside quotes was seen: the next character says whether it closed the field or stands for itself. */
  private quotePending = false;
  private lineFeedPending = false;
  private comment = false;
  /** Comment lines that stand below the first record. */
  commentsBelow = 0;
  /** Nothing but blanks so far, in this field and in this record. */
  private emptyField = true;
  private emptyRecord = true;
  private fieldStart: TextPlace = { line: 1, column: 1 };
  private found: TextPlace | undefined;

  constructor(
    private readonly delimiter: string,
    private readonly target: { readonly record: number; readonly field: number },
  ) {}

  /** The place, as soon as it is known. */
  feed(text: string): TextPlace | undefined {
    for (const character of text) {
      if (this.found !== undefined) break;
      this.step(character);
    }
    return this.found;
  }

  /** After the last piece: the place, or undefined when the text holds no such record. */
  end(): TextPlace | undefined {
    if (this.found === undefined && this.atTargetRecord() && !this.emptyRecord) {
      this.found = this.field === this.target.field ? this.fieldStart : { line: this.line, column: this.column + 1 };
    }
    return this.found;
  }

  private step(character: string): void {
    if (this.lineFeedPending) {
      this.lineFeedPending = false;
      if (character === '\n') return;
    }
    this.column++;
    if (this.quoted && !this.quotePending) {
      if (character === '"') this.quotePending = true;
      else if (character === '\n' || character === '\r') this.breakLine(character);
      return;
    }
    if (this.quotePending) {
      this.quotePending = false;
      if (character === '"') return;
      this.quoted = false;
    }
    if (character === '\n' || character === '\r') this.endRecord(character);
    else if (!this.comment) this.stepInRecord(character);
  }

  private stepInRecord(character: string): void {
    if (character === this.delimiter) {
      this.endField();
      this.emptyRecord = false;
      this.field++;
      this.fieldStart = { line: this.line, column: this.column + 1 };
      return;
    }
    if (!this.emptyField || isBlank(character)) return;
    if (this.emptyRecord && character === '#') {
      this.comment = true;
      if (this.record > 0) this.commentsBelow++;
      return;
    }
    this.quoted = character === '"';
    this.emptyField = this.emptyRecord = false;
    this.fieldStart = { line: this.line, column: this.column };
    if (this.atTargetRecord() && this.field === this.target.field) this.found = this.fieldStart;
  }

  private endField(): void {
    if (this.atTargetRecord() && this.field === this.target.field) this.found ??= this.fieldStart;
    this.emptyField = true;
  }

  private endRecord(character: string): void {
    if (!this.emptyRecord) {
      this.endField();
      if (this.atTargetRecord()) this.found ??= { line: this.line, column: this.column };
      this.record++;
    }
    this.breakLine(character);
    this.field = 0;
    this.comment = false;
    this.emptyField = this.emptyRecord = true;
    this.fieldStart = { line: this.line, column: 1 };
  }

  private breakLine(character: string): void {
    this.line++;
    this.column = 0;
    this.lineFeedPending = character === '\r';
  }

  private atTargetRecord(): boolean {
    return this.record === this.target.record;
  }
}

/** The same for a text that is all there. */
export function placeInText(
  text: string,
  delimiter: string,
  target: { readonly record: number; readonly field: number },
): TextPlace | undefined {
  const finder = new FieldPlace(delimiter, target);
  return finder.feed(text) ?? finder.end();
}

/** How many comment lines stand below the first record of a text. */
export function commentsBelowData(text: string, delimiter: string): number {
  const walk = new FieldPlace(delimiter, { record: Infinity, field: 0 });
  walk.feed(text);
  return walk.commentsBelow;
}

/** `counts.csv:3:7`; only the source's name when the place is not known. */
export const fileAndPlace = (sourceName: string, place: TextPlace | undefined): string =>
  place === undefined ? sourceName : `${sourceName}:${place.line}:${place.column}`;
